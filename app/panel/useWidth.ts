import { type RefObject, useLayoutEffect, useState } from "react";

/** Width of an element, px, followed; `initial` until it is laid out. */
export function useWidth(ref: RefObject<HTMLElement | null>, initial: number): number {
	const [width, setWidth] = useState(initial);
	useLayoutEffect(() => {
		const element = ref.current;
		if (!element || typeof ResizeObserver === "undefined") return;
		const measure = (): void => {
			if (element.clientWidth > 0) setWidth(element.clientWidth);
		};
		measure();
		const observer = new ResizeObserver(measure);
		observer.observe(element);
		return () => observer.disconnect();
	}, [ref]);
	return width;
}
