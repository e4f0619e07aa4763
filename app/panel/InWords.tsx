import { useEffect, useState } from "react";
import { sampleAt } from "../../src/drawing/trace.ts";
import type { AssessedCase } from "../store/core.ts";
import { useDocument } from "../store/document.ts";
import { byMargin } from "../store/findings.ts";
import { dropTrace } from "../store/motion.ts";
import { useSelectedCase } from "../store/navigate.ts";
import { type Printer, usePrinter } from "../store/print.ts";
import { useSession } from "../store/session.ts";
import { onTime } from "../store/transient.ts";
import { findingWords, headlineWords, inWords, nameOf, withOrAgainst } from "./words.ts";

/** The picture's facts as text, for everyone; the sentence about this instant follows when the clock has come to rest. */
export function InWords() {
	const layout = useDocument((s) => s.layout);
	const findings = useDocument((s) => s.assessed.findings);
	const c = useSelectedCase();
	const print = usePrinter();
	const time = useRestingTime();
	if (!c) return null;
	const own = findings.filter((f) => f.subject === c.id && f.crew === c.crew && f.phase === c.phase).sort(byMargin);
	return (
		<section className="words" aria-labelledby="words-heading">
			<h2 id="words-heading">In words</h2>
			{inWords(c, layout, print).map((text) => (
				<p key={text}>{text}</p>
			))}
			<p>{momentWords(c, time, print)}</p>
			{own.length > 0 && (
				<ul>
					{own.map((f) => (
						<li key={f.criterion}>{findingWords(f, print)}</li>
					))}
				</ul>
			)}
			<Announcer c={c} print={print} />
		</section>
	);
}

function momentWords(c: AssessedCase, time: number, print: Printer): string {
	const trace = dropTrace(c);
	if (!trace) return "";
	const along = sampleAt(trace.t, trace.along, time);
	const where = Math.abs(along) < 0.005 ? "below the hand" : `${print(Math.abs(along), "m", 2)} ${withOrAgainst(along)} of the hand`;
	return `At ${time.toFixed(2)} s the object’s centre is ${print(sampleAt(trace.t, trace.height, time), "m")} above the deck, ${where}.`;
}

const REST_MS = 400;

/** The time, once it has stood still for a moment: one timer, however often the clock moves. */
function useRestingTime(): number {
	const [time, setTime] = useState(0);
	useEffect(() => {
		let timer: ReturnType<typeof setTimeout> | undefined;
		let changed = 0;
		let now = 0;
		const look = (): void => {
			const rested = performance.now() - changed;
			timer = rested < REST_MS ? setTimeout(look, REST_MS - rested) : undefined;
			if (timer === undefined) setTime(now);
		};
		const stop = onTime((t) => {
			now = t;
			changed = performance.now();
			timer ??= setTimeout(look, REST_MS);
		});
		return () => {
			clearTimeout(timer);
			stop();
		};
	}, []);
	return time;
}

/** Says politely and seldom what changed: the case, its result, the view, and whether it plays. */
function Announcer({ c, print }: { readonly c: AssessedCase; readonly print: Printer }) {
	const view = useSession((s) => s.view);
	const playing = useSession((s) => s.playing);
	const words = `${nameOf(view)} view, ${nameOf(c.id)}, ${c.crew}, ${c.phase}. ${headlineWords(c, print)}${playing ? " Playing." : ""}`;
	const [said, setSaid] = useState("");
	useEffect(() => {
		const timer = setTimeout(() => setSaid(words), 1000);
		return () => clearTimeout(timer);
	}, [words]);
	return (
		<p className="unseen" aria-live="polite">
			{said}
		</p>
	);
}
