import { useEffect, useMemo, useRef } from "react";
import { sampleAt, type Trace, trace } from "../../src/drawing/trace.ts";
import { printNumber, withUnit } from "../../src/quantity/print-quantity.ts";
import type { AssessedCase } from "../store/core.ts";
import { dropTrace } from "../store/motion.ts";
import type { Printer } from "../store/print.ts";
import { onTime, setTime, transient } from "../store/transient.ts";
import { useWidth } from "./useWidth.ts";

const INSET = { top: 8, right: 10, bottom: 4, left: 46 };
const HEIGHT = 74;
/** Room for the times, under the last plot only. */
const TIMES = 16;

const ZERO = [0];

/** Height and offset against time: drawn once for each case; only the cursor and its readings move. */
export function Traces({ c, print }: { readonly c: AssessedCase; readonly print: Printer }) {
	const box = useRef<HTMLDivElement>(null);
	const width = useWidth(box, 300);
	const samples = dropTrace(c);
	return (
		<div className="traces" ref={box}>
			{samples && (
				<>
					<Plot name="Height above the deck" t={samples.t} y={samples.height} width={width} cover={ZERO} unit="m" print={print} />
					<Plot
						name="Along the deck, − against spin"
						t={samples.t}
						y={samples.along}
						width={width}
						cover={ZERO}
						unit="m"
						print={print}
						last
					/>
				</>
			)}
		</div>
	);
}

interface PlotProps {
	readonly name: string;
	readonly t: readonly number[];
	readonly y: readonly number[];
	readonly width: number;
	readonly cover: readonly number[];
	readonly unit: string;
	readonly print: Printer;
	readonly last?: boolean;
}

function Plot({ name, t, y, width, cover, unit, print, last = false }: PlotProps) {
	const height = HEIGHT + (last ? TIMES : 0);
	const shown = useMemo(() => y.map((v) => print.shown(v, unit)), [y, unit, print]);
	const symbol = print.symbol(unit);
	const drawn = useMemo(
		() =>
			trace({
				width,
				height,
				inset: last ? { ...INSET, bottom: INSET.bottom + TIMES } : INSET,
				x: t,
				y: shown,
				yCover: cover,
				xTicks: Math.max(2, Math.floor(width / 70)),
				yTicks: 3,
			}),
		[width, height, last, t, shown, cover],
	);
	const cursor = useRef<SVGGElement>(null);
	const dot = useRef<SVGCircleElement>(null);
	const reading = useRef<HTMLSpanElement>(null);
	useEffect(
		() =>
			onTime((time) => {
				const value = sampleAt(t, shown, time);
				const x = drawn.xOf(Math.min(time, t[t.length - 1] as number));
				cursor.current?.style.setProperty("transform", `translateX(${x}px)`);
				dot.current?.style.setProperty("transform", `translate(${x}px, ${drawn.yOf(value)}px)`);
				if (reading.current) reading.current.textContent = withUnit(printNumber(value), symbol);
			}),
		[drawn, t, shown, symbol],
	);
	const scrub = (e: React.PointerEvent<SVGSVGElement>): void => {
		const x = e.clientX - e.currentTarget.getBoundingClientRect().left;
		setTime(((x - drawn.left) / (drawn.right - drawn.left)) * transient.duration);
	};
	return (
		<figure>
			<figcaption>
				{name}, {symbol} <span ref={reading} className="value" />
			</figcaption>
			<svg
				width={width}
				height={height}
				aria-hidden="true"
				onPointerDown={(e) => {
					e.currentTarget.setPointerCapture(e.pointerId);
					scrub(e);
				}}
				onPointerMove={(e) => e.buttons === 1 && scrub(e)}
			>
				<Axes drawn={drawn} times={last} />
				<path className="line" d={drawn.path} />
				{tenths(t).map((at) => (
					<circle key={at} className="tenth" cx={drawn.xOf(at)} cy={drawn.yOf(sampleAt(t, shown, at))} r={1.75} />
				))}
				<g ref={cursor} className="cursor">
					<line y1={drawn.top - 4} y2={drawn.bottom} />
				</g>
				<circle ref={dot} className="now" r={3.5} />
			</svg>
		</figure>
	);
}

function Axes({ drawn, times }: { readonly drawn: Trace; readonly times: boolean }) {
	const zero = drawn.yTicks.find((k) => k.value === 0);
	return (
		<g className="axes">
			{drawn.yTicks.map((k) => (
				<g key={k.value}>
					<line className={k === zero ? "zero" : "grid"} x1={drawn.left} x2={drawn.right} y1={k.at} y2={k.at} />
					<text x={drawn.left - 6} y={k.at} dy="0.35em" textAnchor="end">
						{k.label}
					</text>
				</g>
			))}
			{times &&
				drawn.xTicks.map((k, i) => (
					<text key={k.value} x={k.at} y={drawn.bottom + 17} textAnchor={k.at > drawn.right - 12 ? "end" : "middle"}>
						{i === drawn.xTicks.length - 1 ? `${k.label} s` : k.label}
					</text>
				))}
		</g>
	);
}

/** Instants 0.1 s apart, as the dots of the trail; left out where they would run together. */
function tenths(t: readonly number[]): number[] {
	const end = t[t.length - 1] as number;
	const count = Math.floor(end / 0.1 + 1e-9);
	return count > 40 ? [] : Array.from({ length: count + 1 }, (_, i) => i / 10);
}
