/** The same triangles, lines and points as the app's picture, by three.js alone: what the app's frames are held against. */
import {
	BackSide,
	BufferAttribute,
	BufferGeometry,
	Color,
	DirectionalLight,
	DoubleSide,
	FrontSide,
	HemisphereLight,
	Mesh,
	MeshBasicMaterial,
	MeshLambertMaterial,
	NoToneMapping,
	type Object3D,
	PerspectiveCamera,
	Points,
	PointsMaterial,
	Scene,
	WebGLRenderer,
} from "three";
import { LineMaterial } from "three/addons/lines/LineMaterial.js";
import { LineSegments2 } from "three/addons/lines/LineSegments2.js";
import { LineSegmentsGeometry } from "three/addons/lines/LineSegmentsGeometry.js";
import catalogue from "../../../assets/star/catalogue.bin?url";
import type { Drawable, Stars, Triangles, WideLines } from "../../../src/shape/drawable.ts";
import type { View } from "../../../src/shape/drop-picture.ts";
import { PALETTE } from "../../../src/shape/palette.ts";
import { demoPicture, starsOf } from "../demo-picture.ts";

/** What the measuring script calls. */
export interface Bare {
	/** Draws one frame and waits until it is drawn, ms. */
	frame(): number;
	/** Draws frame after frame; times between them, ms. */
	loop(frames: number): Promise<number[]>;
	readonly counts: { readonly triangles: number; readonly segments: number; readonly stars: number; readonly objects: number };
}

declare global {
	interface Window {
		bare?: Bare;
	}
}

const SIDE = { front: FrontSide, back: BackSide, both: DoubleSide } as const;
const palette = Object.values(PALETTE).map((hex) => new Color(hex));
const colours = (indices: Uint8Array, times: number): Float32Array =>
	Float32Array.from([...indices].flatMap((i) => Array.from({ length: times }, () => (palette[i] as Color).toArray()).flat()));

function triangles(d: Triangles, count: number): Mesh {
	const geometry = new BufferGeometry();
	geometry.setAttribute("position", new BufferAttribute(d.position, 3));
	geometry.setAttribute("normal", new BufferAttribute(d.normal, 3));
	geometry.setAttribute("color", new BufferAttribute(colours(d.colour, 1), 3));
	geometry.setIndex(new BufferAttribute(d.index, 1));
	geometry.setDrawRange(0, 3 * count);
	const look = {
		side: SIDE[d.side],
		vertexColors: true,
		transparent: d.opacity < 1 || d.over === true,
		opacity: d.opacity,
		depthTest: d.over !== true,
	};
	const mesh = new Mesh(geometry, d.lit ? new MeshLambertMaterial(look) : new MeshBasicMaterial(look));
	mesh.renderOrder = d.over ? 1 : 0;
	return mesh;
}

function lines(d: WideLines, count: number): LineSegments2 {
	const geometry = new LineSegmentsGeometry();
	geometry.setPositions(d.position);
	geometry.setColors(colours(d.colour, 2));
	geometry.instanceCount = count;
	const over = d.depth === "over";
	const material = new LineMaterial({
		vertexColors: true,
		linewidth: d.width,
		transparent: over || d.opacity < 1,
		opacity: d.opacity,
		depthTest: !over,
	});
	const object = new LineSegments2(geometry, material);
	object.renderOrder = over ? 1 : 0;
	return object;
}

function points(d: Stars): Points {
	const geometry = new BufferGeometry();
	geometry.setAttribute("position", new BufferAttribute(d.direction, 3));
	geometry.setAttribute("color", new BufferAttribute(d.light, 3));
	const object = new Points(geometry, new PointsMaterial({ size: 2, sizeAttenuation: false, vertexColors: true, depthWrite: false }));
	object.renderOrder = -1;
	object.scale.setScalar(1000);
	return object;
}

const asked = new URLSearchParams(location.search);
const width = Number(asked.get("width"));
const height = Number(asked.get("height"));
const stars = starsOf(new Uint8Array(await (await fetch(catalogue)).arrayBuffer()));
const picture = demoPicture();
picture.update(Number(asked.get("time")), asked.get("view") as View, picture.defaultLook(), width, height);

const scene = new Scene();
scene.background = new Color(PALETTE.sky);
scene.add(new HemisphereLight(0xffffff, 0xbbbbbb, 2.9), new DirectionalLight(0xffffff, 0.55));
const counts = { triangles: 0, segments: 0, stars: 0, objects: 0 };
const add = (d: Drawable, count: number): Object3D => {
	counts.objects += 1;
	if (d.kind === "triangles") counts.triangles += count;
	else if (d.kind === "lines") counts.segments += count;
	else counts.stars += count;
	const object = d.kind === "triangles" ? triangles(d, count) : d.kind === "lines" ? lines(d, count) : points(d);
	scene.add(object);
	return object;
};
const whole = (d: Drawable): number => (d.kind === "triangles" ? d.index.length / 3 : d.kind === "lines" ? d.colour.length : d.size.length);
for (const d of [stars, ...picture.stage.still]) add(d, whole(d));
for (const part of picture.parts) {
	if (part.visible === false || part.count === 0) continue;
	const object = add(part.drawable, Math.min(part.count ?? Number.POSITIVE_INFINITY, whole(part.drawable)));
	object.matrixAutoUpdate = false;
	object.matrix.fromArray(part.matrix);
}

const { position, basis, fovY, near, far } = picture.camera;
const camera = new PerspectiveCamera((fovY * 180) / Math.PI, width / height, near, far);
camera.position.fromArray([...position]);
camera.up.fromArray([...basis], 3);
camera.lookAt(...([0, 1, 2].map((k) => (position[k] as number) + (basis[6 + k] as number)) as [number, number, number]));

const canvas = document.querySelector("canvas") as HTMLCanvasElement;
const renderer = new WebGLRenderer({ canvas, antialias: false, stencil: false });
renderer.toneMapping = NoToneMapping;
renderer.setSize(width, height);
const gl = renderer.getContext();
const pixel = new Uint8Array(4);

window.bare = {
	counts,
	frame() {
		const begin = performance.now();
		renderer.render(scene, camera);
		gl.readPixels(0, 0, 1, 1, gl.RGBA, gl.UNSIGNED_BYTE, pixel);
		return performance.now() - begin;
	},
	async loop(frames) {
		const times: number[] = [];
		let last = 0;
		while (times.length < frames) {
			const now = await new Promise<number>((resolve) => requestAnimationFrame(resolve));
			if (last > 0) times.push(now - last);
			last = now;
			renderer.render(scene, camera);
		}
		return times;
	},
};
