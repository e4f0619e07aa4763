import { written } from "../../src/quantity/round.ts";
import { roundStep } from "../../src/quantity/round-step.ts";
import type { AssessedCase, Finding } from "./core.ts";
import { useDocument } from "./document.ts";
import { findingKey, grouped, weightiest } from "./findings.ts";
import { durationOf, eventsOf, fastestPlayback } from "./motion.ts";
import { type CaseKey, useSession, type View } from "./session.ts";
import { setMotion, setTime, transient } from "./transient.ts";

export const keyOf = (c: AssessedCase): CaseKey => ({ activity: c.id, crew: c.crew, phase: c.phase });

const same = (a: CaseKey, b: CaseKey): boolean => a.activity === b.activity && a.crew === b.crew && a.phase === b.phase;

/** The case a key names, or null where the layout has none of it any more. */
export const findCase = (cases: readonly AssessedCase[], key: CaseKey | null): AssessedCase | null =>
	key === null ? null : (cases.find((c) => same(keyOf(c), key)) ?? null);

/** The case on the stage. */
export function useSelectedCase(): AssessedCase | null {
	const cases = useDocument((s) => s.assessed.cases);
	const key = useSession((s) => s.selected);
	return findCase(cases, key);
}

/** The end of the story on a case's clock: its last event, or its end. s */
export const lastMoment = (c: AssessedCase): number => eventsOf(c).at(-1)?.t ?? 0;

/** The instant of a finding on its case's clock, s: its last event exactly where the written number means that. */
function momentOf(f: Finding, c: AssessedCase): number {
	const last = lastMoment(c);
	return f.at.t_s === undefined || f.at.t_s === written(last) ? last : f.at.t_s;
}

/** Puts a case on the stage, stopped at `time`. Cases without a motion are not shown. */
export function selectCase(c: AssessedCase, time: number): void {
	if (!c.motion) return;
	useSession.setState({ selected: keyOf(c), playing: false, finding: null, derivation: null, why: null });
	setMotion(durationOf(c), time, fastestPlayback(c));
}

const built = (): readonly AssessedCase[] => useDocument.getState().assessed.cases.filter((c) => c.motion !== null);

/** The case of a finding: its own activity, crew and phase; null where it is about an element or a deck, or is not built. */
export const caseOfFinding = (cases: readonly AssessedCase[], f: Finding): AssessedCase | null => {
	const found = findCase(cases, { activity: f.subject, crew: f.crew, phase: f.phase });
	return found?.motion ? found : null;
};

/** Chooses a finding: goes to its case and its moment where it has them, and marks it. */
export function selectFinding(f: Finding): void {
	const c = caseOfFinding(built(), f);
	if (c) selectCase(c, momentOf(f, c));
	useSession.setState({ finding: findingKey(f), why: null });
}

/** The next or previous finding in the order of the list, from the chosen one on, around the ends. */
export function stepFinding(by: 1 | -1): void {
	const listed = grouped(useDocument.getState().assessed.findings).flatMap((g) => g.findings);
	const at = listed.findIndex((f) => findingKey(f) === useSession.getState().finding);
	const next = listed[at < 0 ? (by > 0 ? 0 : listed.length - 1) : (at + by + listed.length) % listed.length];
	if (next) selectFinding(next);
}

/** The case of an activity whose findings weigh most; its first where none is assessed. */
export function worstCase(activity: string): AssessedCase | null {
	const cases = built().filter((c) => c.id === activity);
	const worst = weightiest(useDocument.getState().assessed.findings.filter((f) => caseOfFinding(cases, f) !== null));
	return (worst && caseOfFinding(cases, worst)) ?? cases[0] ?? null;
}

/** Opens an activity on its worst case, at the moment of its weightiest finding. */
export function selectActivity(activity: string): void {
	const c = worstCase(activity);
	if (c) selectCase(c, lastMoment(c));
}

/** Opens the finding that matters most and says why in one sentence. */
export function openStory(): void {
	const cases = built();
	const { findings } = useDocument.getState().assessed;
	const told = findings.filter((f) => caseOfFinding(cases, f) !== null);
	const worst = weightiest(told);
	const outside = told.filter((f) => f.result === "outside" && f.basis !== "unverified").length;
	const c = worst ? caseOfFinding(cases, worst) : cases[0];
	useSession.setState({ selected: null, finding: null, derivation: null, playing: false, why: null });
	if (!c) {
		setMotion(0, 0);
		return;
	}
	selectCase(c, worst ? momentOf(worst, c) : lastMoment(c));
	useSession.setState({ finding: worst && findingKey(worst), why: whyOpened(worst, outside) });
}

function whyOpened(worst: Finding | null, outside: number): string {
	if (!worst) return "Opened here: no criterion could be assessed, and this activity comes first.";
	if (worst.result !== "outside") return "Opened here: nothing is outside, and this comes nearest to its limit.";
	if (worst.basis === "unverified") return "Opened here: it is outside, though of a limit that is unverified.";
	if (outside === 1) return "Opened here: this alone is outside its limit.";
	return `Opened here: of ${outside} findings outside their limits this one weighs most.`;
}

/** Keeps case and moment through an edit; a moment at the last event stays at it. Opens anew where the case is gone. */
export function followDocument(): () => void {
	return useDocument.subscribe((now, before) => {
		if (before === undefined || now.assessed === before.assessed) return;
		if (now.id !== before.id) {
			openStory();
			return;
		}
		const { selected } = useSession.getState();
		const is = findCase(now.assessed.cases, selected);
		const was = findCase(before.assessed.cases, selected);
		if (!is?.motion || !was) {
			openStory();
			return;
		}
		const atEnd = transient.time === lastMoment(was);
		setMotion(durationOf(is), atEnd ? lastMoment(is) : transient.time, fastestPlayback(is));
		useSession.setState({ why: null });
	});
}

/** A round step of about a hundredth of the motion, s; 0 where nothing moves. */
export const timeStep = (): number => (transient.duration > 0 ? roundStep(transient.duration / 100) : 0);

export const stepTime = (steps: number): void => {
	useSession.setState({ playing: false });
	setTime(transient.time + steps * timeStep());
};

/** Eyepoint stands still where the person asked for less motion: it is scrubbed instead. */
export const mayPlay = (): boolean => {
	const { view, reducedMotion } = useSession.getState();
	return transient.duration > 0 && !(reducedMotion && view === "eyepoint");
};

/** Plays from here, from the start where it stood at the end; the first Eyepoint run asks first. */
export function play(): void {
	if (!mayPlay()) return;
	const { view, cautionAccepted } = useSession.getState();
	if (view === "eyepoint" && !cautionAccepted) {
		useSession.setState({ dialog: "caution" });
		return;
	}
	if (transient.time >= transient.duration) setTime(0);
	useSession.setState({ playing: true });
}

export const pause = (): void => useSession.setState({ playing: false });

/** A running picture that has not been cautioned about stops when it would turn into the Eyepoint. */
export function setView(view: View): void {
	const { cautionAccepted, reducedMotion } = useSession.getState();
	const stops = view === "eyepoint" && (!cautionAccepted || reducedMotion);
	useSession.setState((s) => ({ view, playing: s.playing && !stops }));
}
