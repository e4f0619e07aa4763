import { type KeyboardEvent, useEffect, useRef } from "react";
import { ruler } from "../../src/drawing/trace.ts";
import { printNumber } from "../../src/quantity/print-quantity.ts";
import { commandNamed } from "../command/all.ts";
import { durationOf, eventsOf, fastestPlayback } from "../store/motion.ts";
import { mayPlay, pause, stepTime, useSelectedCase } from "../store/navigate.ts";
import { SPEEDS, useSession } from "../store/session.ts";
import { onTime, setTime, transient } from "../store/transient.ts";
import { CommandButton } from "./CommandButton.tsx";
import { useWidth } from "./useWidth.ts";

/** How often a moving clock is told to assistive technology, ms. */
const TELL_MS = 500;

const seconds = (t: number): string => printNumber(t, t >= 10 ? 3 : t >= 1 ? 3 : 2);
export const timeWords = (t: number, duration: number): string => `${t.toFixed(2)} s of ${duration.toFixed(2)} s`;

const STEPS: Readonly<Record<string, number>> = { ArrowLeft: -1, ArrowDown: -1, ArrowRight: 1, ArrowUp: 1 };
const play = commandNamed("play");

/** The clock of the case on the stage: play, step and scrub, with what happens marked where it happens. */
export function TimeRule() {
	const c = useSelectedCase();
	const playing = useSession((s) => s.playing);
	const speed = useSession((s) => s.speed);
	const fastest = c ? fastestPlayback(c) : Number.POSITIVE_INFINITY;
	const still = useSession((s) => s.reducedMotion && s.view === "eyepoint");
	const box = useRef<HTMLDivElement>(null);
	const width = useWidth(box, 600);
	const now = useRef<HTMLElement>(null);
	const cursor = useRef<HTMLSpanElement>(null);
	const slider = useRef<HTMLInputElement>(null);
	const duration = c ? durationOf(c) : 0;
	useEffect(() => {
		let told = Number.NEGATIVE_INFINITY;
		return onTime((time) => {
			if (now.current) now.current.textContent = time.toFixed(2);
			const share = transient.duration > 0 ? time / transient.duration : 0;
			cursor.current?.style.setProperty("transform", `translateX(${share * width}px)`);
			const clock = performance.now();
			if (!slider.current || (useSession.getState().playing && clock - told < TELL_MS && time < transient.duration)) return;
			told = clock;
			slider.current.value = String(time);
			slider.current.setAttribute("aria-valuetext", timeWords(time, transient.duration));
		});
	}, [width]);
	if (!c) return null;
	const onKeyDown = (e: KeyboardEvent): void => {
		if (e.ctrlKey || e.metaKey || e.altKey) return;
		const steps = STEPS[e.key];
		if (steps !== undefined) stepTime(e.shiftKey ? 10 * steps : steps);
		else if (e.key === "Home") setTime(0);
		else if (e.key === "End") setTime(transient.duration);
		else if (e.key === " " && play.enabled()) play.run();
		else return;
		e.preventDefault();
	};
	return (
		<section className="time" aria-label="Time">
			<div className="transport">
				<CommandButton command={commandNamed("step-back")} icon="back" />
				{!still && <CommandButton command={play} icon={playing ? "pause" : "play"} className="primary square" />}
				<CommandButton command={commandNamed("step-on")} icon="on" />
			</div>
			<p className="clock" aria-hidden="true">
				<b ref={now}>0.00</b> <span>of {duration.toFixed(2)} s</span>
			</p>
			<div className="rule">
				<div className="scale" ref={box}>
					{duration > 0 && <Scale duration={duration} width={width} events={eventsOf(c)} />}
					<input
						ref={slider}
						type="range"
						aria-label="Time"
						min={0}
						max={duration}
						step="any"
						defaultValue={0}
						disabled={!(duration > 0)}
						onInput={(e) => {
							pause();
							setTime(Number(e.currentTarget.value));
						}}
						onKeyDown={onKeyDown}
					/>
					<span ref={cursor} className="cursor" aria-hidden="true" />
				</div>
			</div>
			{still ? (
				<p className="speed muted">Less motion is asked for: scrub or step.</p>
			) : (
				<label className="speed">
					<span className="name">Speed</span>
					<select
						aria-label="Speed of playback"
						value={speed}
						onChange={(e) => useSession.setState({ speed: Number(e.target.value) })}
						disabled={!mayPlay()}
					>
						{SPEEDS.map((s) => (
							<option key={s} value={s}>
								{s < 1 ? `1/${1 / s}` : s} ×
							</option>
						))}
					</select>
					{speed > fastest && (
						<span className="muted" role="status">
							held at {fastest.toPrecision(2)} ×: windows flash at most 3 times a second
						</span>
					)}
				</label>
			)}
		</section>
	);
}

function Scale({
	duration,
	width,
	events,
}: {
	readonly duration: number;
	readonly width: number;
	readonly events: ReturnType<typeof eventsOf>;
}) {
	const { major, minor } = ruler(duration, width, 72);
	const last = major.at(-1);
	return (
		<svg width={width} height={56} aria-hidden="true">
			<line className="base" x1={0} x2={width} y1={32} y2={32} />
			{minor.map((at) => (
				<line key={at} x1={at} x2={at} y1={27} y2={32} />
			))}
			{major.map((k) => (
				<g key={k.value}>
					<line x1={k.at} x2={k.at} y1={22} y2={32} />
					<text x={k.at} y={15} textAnchor={k.at < 12 ? "start" : k.at > width - 16 ? "end" : "middle"}>
						{k === last ? `${k.label} s` : k.label}
					</text>
				</g>
			))}
			{events.map((e) => {
				const at = (e.t / duration) * width;
				return (
					<g key={e.name} className="event">
						<path d={`M${at} 32v8`} />
						<text x={at} y={52} textAnchor={at < 30 ? "start" : at > width - 30 ? "end" : "middle"}>
							{e.name} {e.t > 0 && <tspan>{seconds(e.t)} s</tspan>}
						</text>
					</g>
				);
			})}
		</svg>
	);
}
