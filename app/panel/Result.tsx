import { useId } from "react";
import type { AssessedCase, Finding } from "../store/core.ts";
import { useDocument } from "../store/document.ts";
import { findingKey, weightiest } from "../store/findings.ts";
import { useSelectedCase, worstCase } from "../store/navigate.ts";
import { type Printer, usePrinter } from "../store/print.ts";
import { useSession } from "../store/session.ts";
import { DerivationPanel } from "./DerivationPanel.tsx";
import { Numbers } from "./Numbers.tsx";
import { Traces } from "./Traces.tsx";
import { consequence, headline, limitWords, nameOf, quantityWords, RESULT_WORDS } from "./words.ts";

/** What came out: the one sentence with its number, the limit it is held against, the traces and the remaining numbers. */
export function Result() {
	const c = useSelectedCase();
	const count = useDocument((s) => s.assessed.cases.filter((other) => other.id === c?.id).length);
	const print = usePrinter();
	if (!c)
		return (
			<section className="result" aria-label="Result">
				<p>Nothing in this layout can be shown yet: of the activities only drops are built.</p>
			</section>
		);
	return (
		<section className="result" aria-labelledby="result-heading">
			<h2 id="result-heading" className="eyebrow">
				{nameOf(c.id)}{" "}
				<span>
					{c.crew}, {c.phase}
					{count > 1 && (worstCase(c.id) === c ? `, worst of ${count} cases` : ", not the worst case")}
				</span>
			</h2>
			<Hero c={c} print={print} />
			<Verdict c={c} print={print} />
			<Traces c={c} print={print} />
			<Numbers c={c} headline={headline(c, print)?.key ?? null} print={print} />
		</section>
	);
}

function Hero({ c, print }: { readonly c: AssessedCase; readonly print: Printer }) {
	const open = useSession((s) => s.derivation);
	const id = useId();
	const h = headline(c, print);
	if (!h) return null;
	const shown = print.parts(h.value, h.unit, 2);
	const derivation = h.key === null ? undefined : c.derivations[h.key];
	const expanded = derivation !== undefined && open === h.key;
	return (
		<>
			<div className="hero">
				<span className="lead">{h.lead}</span>
				<button
					type="button"
					className="number"
					aria-expanded={expanded}
					aria-controls={expanded ? id : undefined}
					title={derivation ? "How this number came about" : undefined}
					disabled={!derivation}
					onClick={() => useSession.setState({ derivation: expanded ? null : h.key })}
				>
					<b>{shown.number}</b> <span>{shown.unit}</span>
				</button>
				<span className="tail">{h.tail}</span>
				{h.also && <p>{h.also}</p>}
			</div>
			{expanded && <DerivationPanel id={id} derivation={derivation} />}
		</>
	);
}

/** The finding of this case that was chosen, else the one that weighs most. */
function Verdict({ c, print }: { readonly c: AssessedCase; readonly print: Printer }) {
	const findings = useDocument((s) => s.assessed.findings);
	const chosen = useSession((s) => s.finding);
	const own = findings.filter((f) => f.subject === c.id && f.crew === c.crew && f.phase === c.phase);
	const shown: Finding | null = own.find((f) => findingKey(f) === chosen) ?? weightiest(own) ?? own[0] ?? null;
	const why = useSession((s) => s.why);
	const after = consequence(c, print);
	return (
		<div className={`verdict ${shown?.result ?? ""}`}>
			{shown && (
				<>
					<p className="word">
						<b>{nameOf(RESULT_WORDS[shown.result])}</b>
						<span>
							{shown.force === "information" ? "for information" : `a limit that ${shown.force} be kept`}
							{shown.basis === "unverified" ? ", unverified, confirm" : ""}
						</span>
					</p>
					<p>
						{shown.title}
						{shown.value === null ? `: ${shown.reason}` : ""}
					</p>
					{shown.value !== null && (
						<p className="limit">
							{quantityWords(shown)} <span className="value">{print(shown.value, shown.unit)}</span>, limit {limitWords(shown, print)}
						</p>
					)}
				</>
			)}
			{after && <p className="after">{after}</p>}
			{why && <p className="why">{why}</p>}
		</div>
	);
}
