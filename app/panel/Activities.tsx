import { tinyPath } from "../../src/drawing/trace.ts";
import type { AssessedCase, LayoutFile } from "../store/core.ts";
import { useDocument } from "../store/document.ts";
import { dropTrace } from "../store/motion.ts";
import { lastMoment, selectActivity, selectCase, useSelectedCase, worstCase } from "../store/navigate.ts";
import { type Printer, usePrinter } from "../store/print.ts";
import { phaseRate } from "./levels.ts";
import { detailOf, nameOf } from "./words.ts";

/** A card for each activity that is built, with its motion in small; the others are named, and that is all. */
export function Activities() {
	const cases = useDocument((s) => s.assessed.cases);
	const selected = useSelectedCase();
	const print = usePrinter();
	const first = cases.filter((c, i) => cases.findIndex((other) => other.id === c.id) === i);
	const built = first.filter((c) => c.motion !== null);
	const unbuilt = first.filter((c) => c.motion === null);
	return (
		<section className="activities" aria-labelledby="activities-heading">
			<h2 id="activities-heading">Activities</h2>
			{built.length === 0 && <p className="muted">This layout has no activity that can be shown yet.</p>}
			<ul>
				{built.map((c) => (
					<li key={c.id}>
						<button type="button" className="card" aria-pressed={selected?.id === c.id} onClick={() => selectActivity(c.id)}>
							<span>
								<strong>{nameOf(c.id)}</strong>
								<span className="muted">{detailOf(c, print)}</span>
							</span>
							<Tiny shown={selected?.id === c.id ? selected : c} />
						</button>
					</li>
				))}
			</ul>
			{selected && <CaseSelectors selected={selected} all={cases.filter((c) => c.id === selected.id)} print={print} />}
			{unbuilt.length > 0 && (
				<p className="unbuilt">
					<span>Not built yet:</span> {unbuilt.map((c) => nameOf(c.id)).join(", ")}.
				</p>
			)}
		</section>
	);
}

const TINY = { width: 44, height: 36, inset: 4 };

/** The path seen from its +axial end, as in Section: with spin is right at the bottom of the ring. */
function Tiny({ shown }: { readonly shown: AssessedCase }) {
	const trace = dropTrace(shown);
	if (!trace) return null;
	const { width, height, inset } = TINY;
	return (
		<svg className="tiny" width={width} height={height} viewBox={`0 0 ${width} ${height}`} aria-hidden="true">
			<path d={tinyPath(trace.along, trace.height, width, height, inset)} />
		</svg>
	);
}

interface SelectorsProps {
	readonly selected: AssessedCase;
	readonly all: readonly AssessedCase[];
	readonly print: Printer;
}

/** Who does it and in which phase; a choice only where the layout gives one. */
function CaseSelectors({ selected, all, print }: SelectorsProps) {
	const layout = useDocument((s) => s.layout);
	const worst = worstCase(selected.id);
	const crew = [...new Set(all.map((c) => c.crew))];
	const phases = [...new Set(all.map((c) => c.phase))];
	const go = (who: string, phase: string): void => {
		const found = all.find((c) => c.crew === who && c.phase === phase);
		if (found) selectCase(found, lastMoment(found));
	};
	const single = crew.length * phases.length === 1;
	return (
		<div className="case">
			<Selector
				label="Crew"
				value={selected.crew}
				options={crew.map((id) => ({
					id,
					text: crewWords(layout, id, print),
					worst: !single && worst?.crew === id && worst.phase === selected.phase,
				}))}
				choose={(id) => go(id, selected.phase)}
			/>
			<Selector
				label="Phase"
				value={selected.phase}
				options={phases.map((id) => ({
					id,
					text: `${id}, ${print(phaseRate(layout, id), "rpm")}`,
					worst: !single && worst?.phase === id && worst.crew === selected.crew,
				}))}
				choose={(id) => go(selected.crew, id)}
			/>
			<p className="muted">
				{single
					? "The only case of this activity."
					: worst === selected
						? "This is the worst case."
						: `The worst case is ${worst?.crew}, ${worst?.phase}.`}
			</p>
		</div>
	);
}

interface Option {
	readonly id: string;
	readonly text: string;
	readonly worst: boolean;
}

function Selector({
	label,
	value,
	options,
	choose,
}: {
	readonly label: string;
	readonly value: string;
	readonly options: readonly Option[];
	readonly choose: (id: string) => void;
}) {
	const [only] = options;
	return (
		<div className="field">
			{options.length === 1 && only ? (
				<>
					<span className="name">{label}</span>
					<span className="fixed">{only.text}</span>
				</>
			) : (
				<label>
					<span className="name">{label}</span>
					<select value={value} onChange={(e) => choose(e.target.value)}>
						{options.map((o) => (
							<option key={o.id} value={o.id}>
								{o.text}
								{o.worst ? " (worst)" : ""}
							</option>
						))}
					</select>
				</label>
			)}
		</div>
	);
}

function crewWords(layout: LayoutFile, id: string, print: Printer): string {
	const member = layout.crew.find((c) => c.id === id);
	return member ? `${id}, ${print(member.stature_m, "m")}` : id;
}
