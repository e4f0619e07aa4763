import { useEffect, useLayoutEffect, useMemo, useRef, useState } from "react";
import type { DropPicture } from "../../src/shape/drop-picture.ts";
import type { AssessedCase, Finding } from "../store/core.ts";
import { useDocument } from "../store/document.ts";
import { weightiest } from "../store/findings.ts";
import { usePrinter } from "../store/print.ts";
import { useSession } from "../store/session.ts";
import { dropLabels } from "./labels.ts";
import { type Label, LabelPlacer } from "./place.ts";

/** The labels over the canvas: DOM, so that they stay sharp, can be read out and pressed. The conductor moves them. */
export function Labels({
	shown,
	picture,
	onPlacer,
}: {
	readonly shown: AssessedCase;
	readonly picture: DropPicture;
	readonly onPlacer: (placer: LabelPlacer | null) => void;
}) {
	const print = usePrinter();
	const external = useSession((s) => s.view === "external");
	const findings = useDocument((s) => s.assessed.findings);
	const texts = useMemo(
		() => dropLabels(picture, print, verdictOf(shown, findings), external),
		[shown, picture, print, findings, external],
	);
	const host = useRef<HTMLDivElement>(null);
	const fonts = useFontLoads();
	// biome-ignore lint/correctness/useExhaustiveDependencies: a font that arrives changes every size
	useLayoutEffect(() => {
		const children = [...(host.current?.children ?? [])] as HTMLElement[];
		const labels: Label[] = texts.map((text, i) => {
			const element = children[i] as HTMLElement;
			return {
				anchor: text.anchor,
				element,
				rank: i,
				hang: text.hang ?? "free",
				tries: text.tries,
				live: text.live ?? null,
				said: text.text,
				bar: text.bar === undefined ? null : { element: element.firstElementChild as HTMLElement, step: text.bar, width: -1 },
				width: element.offsetWidth,
				height: element.offsetHeight,
				taken: -1,
			};
		});
		const stage = host.current?.parentElement;
		const control = stage?.querySelector<HTMLElement>(".field-of-view");
		const corner =
			stage && control
				? { width: stage.clientWidth - control.offsetLeft, height: stage.clientHeight - control.offsetTop }
				: { width: 0, height: 0 };
		onPlacer(new LabelPlacer(labels, corner));
		return () => onPlacer(null);
	}, [texts, fonts, onPlacer]);
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
						{text.verdict && <em>{text.verdict}</em>}
					</button>
				) : (
					<span key={text.anchor} className={`label ${text.look} ${text.letter ? `force-${text.letter}` : ""}`} aria-hidden="true">
						{text.bar !== undefined && <i className="bar" />}
						{text.text}
					</span>
				),
			)}
		</div>
	);
}

/** Counts the fonts that arrived since. */
function useFontLoads(): number {
	const [loads, setLoads] = useState(0);
	useEffect(() => {
		const count = (): void => setLoads((n) => n + 1);
		document.fonts.addEventListener("loadingdone", count);
		return () => document.fonts.removeEventListener("loadingdone", count);
	}, []);
	return loads;
}

/** What the findings say of the landing, in a few words; unverified limits and what is not assessed are never passed over. */
function verdictOf(c: AssessedCase, findings: readonly Finding[]): string | null {
	const own = findings.filter((f) => f.subject === c.id && f.crew === c.crew && f.phase === c.phase);
	const outside = own.filter((f) => f.result === "outside");
	const worst = weightiest(outside.filter((f) => f.basis !== "unverified"));
	if (worst) return OUTSIDE[worst.quantity] ?? "outside its limit";
	if (outside.length > 0) return "outside an unverified limit";
	const open = own.filter((f) => f.result === "not-assessed").length;
	if (own.length === open) return open > 0 ? "not assessed" : null;
	const unverified = own.some((f) => f.result === "within" && f.basis === "unverified");
	return `within${open > 0 ? `, ${open} not assessed` : ""}${unverified ? ", a limit unverified" : ""}`;
}
const OUTSIDE: Readonly<Record<string, string>> = {
	walkway_landings: "outside: on the walkway",
	hatches_passed: "outside: through a hatch",
	coamings_struck: "outside: strikes a coaming",
};
