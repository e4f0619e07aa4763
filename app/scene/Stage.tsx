import { useCallback, useEffect, useLayoutEffect, useMemo, useRef, useState } from "react";
import { DropFigure } from "../../src/shape/drop-figure.ts";
import { DropPicture } from "../../src/shape/drop-picture.ts";
import { DropStage } from "../../src/shape/drop-stage.ts";
import { createFigure, type Figure } from "../../src/shape/figure.ts";
import { StillShapes } from "../../src/shape/still.ts";
import { FieldOfView } from "../control/FieldOfView.tsx";
import { listenKeys } from "../control/keys.ts";
import { currentLook, onLook, takeStation } from "../control/look.ts";
import { listenPointer } from "../control/pointer.ts";
import { Labels } from "../label/Labels.tsx";
import type { LabelPlacer } from "../label/place.ts";
import type { AssessedCase } from "../store/core.ts";
import { useDocument } from "../store/document.ts";
import { useSelectedCase } from "../store/navigate.ts";
import { useSession } from "../store/session.ts";
import { useStars } from "../store/stars.ts";
import { advance, onTime, transient } from "../store/transient.ts";
import { Conductor } from "./conductor.ts";
import { offerProbe } from "./probe-stage.ts";
import { usePainter } from "./usePainter.ts";

/** The picture of a case; null where its kind is not built. */
function pictureOf(c: AssessedCase | null, shapes: StillShapes, figure: Figure): DropPicture | null {
	if (!c?.motion) return null;
	const { context, motion } = c;
	return new DropPicture(new DropStage(context.habitat, context.spin, motion, shapes), new DropFigure(motion, figure));
}

/** The stage: canvas, controls and labels of the selected case. */
export function Stage() {
	const shown = useSelectedCase();
	const view = useSession((s) => s.view);
	const [shapes] = useState(() => new StillShapes());
	const stature = shown?.context.person.stature ?? 1.75;
	const figure = useMemo(() => createFigure(stature), [stature]);
	const picture = useMemo(() => pictureOf(shown, shapes, figure), [shown, shapes, figure]);
	const host = useRef<HTMLDivElement>(null);
	const placer = useRef<LabelPlacer | null>(null);
	const live = useRef(picture);
	live.current = picture;
	const [conductor] = useState(
		() =>
			new Conductor({
				picture: () => live.current,
				stars: () => useStars.getState().stars,
				look: currentLook,
				view: () => useSession.getState().view,
				time: () => transient.time,
				advance,
				drawn: (p, width, height) => placer.current?.place(p, width, height),
			}),
	);
	const document = useDocument((s) => s.id);
	const station = shown ? JSON.stringify([document, shown.id, shown.crew, shown.phase]) : "";
	useLayoutEffect(() => {
		if (picture) takeStation(station, picture.defaultLook());
	}, [picture, station]);

	useEffect(() => {
		const element = host.current;
		if (!element) return;
		const current = () => useSession.getState().view;
		const undo = [
			listenPointer(element, current),
			listenKeys(element, current),
			onLook(conductor.wake),
			onTime(conductor.wake),
			useSession.subscribe(conductor.wake),
			useStars.subscribe(conductor.wake),
		];
		const sizes = new ResizeObserver(() => conductor.resize(element.clientWidth, element.clientHeight));
		sizes.observe(element);
		return () => {
			sizes.disconnect();
			for (const off of undo) off();
			conductor.stop();
		};
	}, [conductor]);
	// biome-ignore lint/correctness/useExhaustiveDependencies: another picture or view is what makes a frame due
	useEffect(() => conductor.wake(), [conductor, picture, view]);

	useEffect(() => offerProbe(conductor, () => live.current), [conductor]);
	const canvas = usePainter(conductor);
	const take = useCallback(
		(next: LabelPlacer | null) => {
			placer.current = next;
			conductor.wake();
		},
		[conductor],
	);
	return (
		// biome-ignore lint/a11y/noNoninteractiveTabindex: the stage is operated by keys of its own
		<div ref={host} className="picture" role="application" tabIndex={0} aria-label={stageName(shown, view)} data-picture={canvas.kind}>
			{canvas.element}
			{shown && picture && <Labels shown={shown} picture={picture} onPlacer={take} />}
			{picture && <FieldOfView view={view} />}
			{canvas.lost && <p className="lost">The picture was lost by the graphics system. It comes back by itself.</p>}
			{canvas.failed && <p className="lost">The picture cannot be drawn here: {canvas.failed}. The same facts stand in words beside it.</p>}
			{!picture && <p className="lost">Nothing to show: choose an activity that is built.</p>}
		</div>
	);
}

const stageName = (c: AssessedCase | null, view: string): string =>
	c ? `${view === "eyepoint" ? "Eyepoint" : "External"} view of ${c.id}: arrow keys look, Home resets, Space plays` : "Stage, empty";
