import { marginBar } from "../../src/drawing/margin.ts";
import { printNumber } from "../../src/quantity/print-quantity.ts";
import type { Finding, LayoutFile } from "../store/core.ts";
import { useDocument } from "../store/document.ts";
import { type FindingGroup, findingKey, grouped } from "../store/findings.ts";
import { selectFinding } from "../store/navigate.ts";
import { type Printer, usePrinter } from "../store/print.ts";
import { useSession } from "../store/session.ts";
import { limitWords, quantityWords, RESULT_WORDS, sourceWords, subjectWords } from "./words.ts";

const FORCE_WORDS: Readonly<Record<Finding["force"], string>> = { shall: "Shall", should: "Should", information: "Information" };

/** Every criterion against every subject and case, by force; what is outside comes first. */
export function Findings() {
	const findings = useDocument((s) => s.assessed.findings);
	const layout = useDocument((s) => s.layout);
	const chosen = useSession((s) => s.finding);
	const print = usePrinter();
	return (
		<section className="findings" aria-labelledby="findings-heading">
			<h2 id="findings-heading">Findings</h2>
			{findings.length === 0 && <p className="muted">This layout names no criteria.</p>}
			{grouped(findings).map((group) => (
				<details
					key={group.force}
					open={group.force !== "information" || group.findings.some((f) => findingKey(f) === chosen) || undefined}
				>
					<summary>
						<b>{FORCE_WORDS[group.force]}</b> <span>{tallyWords(group)}</span>
					</summary>
					<ul>
						{group.findings.map((f) => (
							<Row key={findingKey(f)} f={f} layout={layout} chosen={findingKey(f) === chosen} print={print} />
						))}
					</ul>
				</details>
			))}
		</section>
	);
}

function tallyWords({ tally }: FindingGroup): string {
	const parts = [`${tally.outside} outside`, `${tally.within} within`];
	if (tally.notAssessed > 0) parts.push(`${tally.notAssessed} not assessed`);
	return `${parts.join(", ")}${tally.unverified > 0 ? `; ${tally.unverified} unverified, not counted` : ""}`;
}

interface RowProps {
	readonly f: Finding;
	readonly layout: LayoutFile;
	readonly chosen: boolean;
	readonly print: Printer;
}

function Row({ f, layout, chosen, print }: RowProps) {
	return (
		<li className={`finding ${f.result}`}>
			<button type="button" aria-pressed={chosen} onClick={() => selectFinding(f)}>
				<span className="title">{f.title}</span>
				<span className="word">{RESULT_WORDS[f.result]}</span>
				<span className="who">
					<span>{subjectWords(f, layout)}</span>
					<span>{sourceWords(f)}</span>
				</span>
				{f.value !== null && f.margin !== null && <Bar f={f} value={f.value} print={print} />}
				<span className="held">
					{f.value === null ? (
						<span>{f.reason ?? "no value"}</span>
					) : (
						<span>
							{quantityWords(f)} <span className="value">{print(f.value, f.unit)}</span>, {limitWords(f, print)}
						</span>
					)}
					{f.basis === "unverified" && <em>unverified, confirm</em>}
				</span>
			</button>
			{chosen && (
				<div className="more">
					{f.note && <p>{f.note}</p>}
					<p>
						<b>Basis</b> {f.basis === "unverified" ? "unverified, confirm" : f.basis.replace("-", " ")}
						{f.source ? (
							<>
								. <b>Source</b> {f.source}
							</>
						) : null}
					</p>
				</div>
			)}
		</li>
	);
}

/** The margin as a bar from the limit: plain where within, hatched where outside; both ends and the limit are printed. */
function Bar({ f, value, print }: { readonly f: Finding; readonly value: number; readonly print: Printer }) {
	const shown = { value: print.shown(value, f.unit), limit: print.shown(f.limit, f.unit) };
	const bar = marginBar(shown.value, shown.limit);
	const from = Math.min(bar.limitAt, bar.valueAt) * 100;
	const width = Math.abs(bar.valueAt - bar.limitAt) * 100;
	const at = bar.limitAt * 100;
	return (
		<span className="margin" aria-hidden="true">
			<span className="line">
				<span className={f.result} style={{ left: `${from}%`, width: `${width}%` }} />
				<i style={{ left: `${at}%` }} />
			</span>
			<span className="ends">
				{at > 14 && <span style={{ left: 0 }}>{printNumber(bar.low, 2)}</span>}
				<span style={{ left: `${at}%` }} className={at < 14 ? "first" : at > 86 ? "last" : "limit"}>
					{printNumber(shown.limit)}
				</span>
				{at < 86 && <span style={{ right: 0 }}>{printNumber(bar.high, 2)}</span>}
			</span>
		</span>
	);
}
