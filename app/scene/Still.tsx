import { useEffect, useMemo } from "react";
import type { Drawable } from "../../src/shape/drawable.ts";
import { dispose, wrap } from "./wrap.ts";

/** What does not move: bay and elements. */
export function Still({ drawables }: { readonly drawables: readonly Drawable[] }) {
	const objects = useMemo(
		() =>
			drawables.flatMap((d, i) => {
				if (d.kind === "stars") return [];
				const object = wrap(d, i);
				object.matrixAutoUpdate = false;
				return [object];
			}),
		[drawables],
	);
	useEffect(
		() => () => {
			for (const object of objects) dispose(object);
		},
		[objects],
	);
	return objects.map((object) => <primitive key={object.uuid} object={object} />);
}
