import { useLayoutEffect, useMemo, useRef } from "react";
import type { DropPicture } from "../../src/shape/drop-picture.ts";
import type { AssessedCase } from "../store/core.ts";
import { usePrinter } from "../panel/print.ts";
import { useSession } from "../store/session.ts";
import { dropLabels } from "./labels.ts";
import { type Label, LabelPlacer } from "./place.ts";

/** The labels over the canvas: DOM, so that they stay sharp, can be read out and pressed. The conductor moves them. */
export function Labels({ shown, picture, onPlacer }: { readonly shown: AssessedCase; readonly picture: DropPicture; readonly onPlacer: (placer: LabelPlacer | null) => void }) {
	const print = usePrinter();
	const texts = useMemo(() => dropLabels(shown, picture, print), [shown, picture, print]);
	const host = useRef<HTMLDivElement>(null);
	useLayoutEffect(() => {
		const children = [...(host.current?.children ?? [])] as HTMLElement[];
		const labels: Label[] = texts.map((text, i) => {
			const element = children[i] as HTMLElement;
			return {
				anchor: text.anchor,
				element,
				rank: i,
				centred: text.centred === true,
				tries: text.tries,
				width: element.offsetWidth,
				height: element.offsetHeight,
				taken: -1,
			};
		});
		onPlacer(new LabelPlacer(labels));
		return () => onPlacer(null);
	}, [texts, onPlacer]);
	return (
		<div ref={host} className="labels">
			{texts.map((text) =>
				text.opens ? (
					<button
						key={text.anchor}
						type="button"
						className={`label ${text.look}`}
						onClick={() => useSession.setState({ derivation: text.opens ?? null })}
					>
						{text.text}
					</button>
				) : (
					<span key={text.anchor} className={`label ${text.look} ${text.letter ? `force-${text.letter}` : ""}`} aria-hidden="true">
						{text.bar === undefined ? text.text : <ScaleBar picture={picture} metres={text.bar} print={print} />}
					</span>
				),
			)}
		</div>
	);
}

function ScaleBar({ picture, metres, print }: { readonly picture: DropPicture; readonly metres: number; readonly print: (value: number, unit: string) => string }) {
	const greatest = picture.stage.greatest.centrifugal;
	const step = greatest > 0 ? 10 ** Math.floor(Math.log10(greatest / 2)) * metres : metres;
	return (
		<>
			<i className="bar" style={{ width: greatest > 0 ? (74 * step) / greatest : 0 }} />
			{print(step, "m/s²")}
		</>
	);
}
