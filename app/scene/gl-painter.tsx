import { createRoot, extend, flushSync, type ReconcilerRoot, type RootState } from "@react-three/fiber";
import { Group, PerspectiveCamera } from "three";
import type { Stars } from "../../src/shape/drawable.ts";
import type { DropPicture } from "../../src/shape/drop-picture.ts";
import { Lights } from "./Lights.tsx";
import { Moving } from "./Moving.tsx";
import type { Painter } from "./painter.ts";
import { Sky } from "./Sky.tsx";
import { Still } from "./Still.tsx";
import { Viewpoint } from "./Viewpoint.tsx";
import { freeSpent } from "./wrap.ts";

extend({ Group });

/** The picture by WebGL: an r3f root that draws only when the conductor says so. */
export async function createGlPainter(canvas: HTMLCanvasElement): Promise<Painter> {
	const camera = new PerspectiveCamera();
	camera.matrixAutoUpdate = false;
	const root: ReconcilerRoot<HTMLCanvasElement> = createRoot(canvas);
	try {
		await root.configure({
			frameloop: "never",
			dpr: 1,
			flat: true,
			camera: camera as never,
			gl: { canvas, antialias: false, alpha: false, stencil: false, powerPreference: "high-performance" },
			size: { width: canvas.clientWidth || 1, height: canvas.clientHeight || 1, top: 0, left: 0 },
		});
	} catch (error) {
		root.unmount();
		throw error;
	}
	let store: { getState(): RootState } | null = null;
	let ready = false;
	let shown: DropPicture | null = null;
	let under: Stars | null = null;
	const onReady = (): void => {
		ready = true;
	};
	return {
		kind: "webgl",
		get lost() {
			return store?.getState().gl.getContext().isContextLost() ?? false;
		},
		show(picture, stars) {
			if (picture === shown && stars === under) return;
			if (picture !== shown) ready = false;
			shown = picture;
			under = stars;
			// At once, so that this very frame can paint it.
			flushSync(() => {
				store = root.render(
					<>
						<Lights />
						<Viewpoint picture={picture} camera={camera} />
						<Sky picture={picture} stars={stars} />
						<Still picture={picture} />
						<Moving parts={picture.figure.parts} from={2000} />
						<Moving parts={picture.others} from={3000} onReady={onReady} />
					</>,
				);
			});
		},
		paint(width, height, scale) {
			const state = store?.getState();
			if (!state || !ready || width < 1 || height < 1 || state.gl.getContext().isContextLost()) return false;
			if (state.size.width !== width || state.size.height !== height) state.setSize(width, height);
			if (state.viewport.dpr !== scale) state.setDpr(scale);
			state.advance(performance.now(), true);
			freeSpent();
			return true;
		},
		dispose() {
			root.unmount();
			freeSpent();
		},
	};
}
