import {
	BackSide,
	BufferAttribute,
	BufferGeometry,
	DoubleSide,
	FrontSide,
	type Material,
	Mesh,
	MeshBasicMaterial,
	MeshLambertMaterial,
	type Object3D,
} from "three";
import { LineMaterial } from "three/addons/lines/LineMaterial.js";
import { LineSegments2 } from "three/addons/lines/LineSegments2.js";
import { LineSegmentsGeometry } from "three/addons/lines/LineSegmentsGeometry.js";
import type { Triangles, WideLines } from "../../src/shape/drawable.ts";
import { linearColours } from "./palette-linear.ts";

// Lines lie 2 mm off their face and paint 1 mm: faces are pushed back a little so that both win at a slant.

/** Draw order: opaque, painted, lines, translucent in list order, over everything in list order. */
const ORDER = { opaque: 0, decal: 1, lines: 2, translucent: 1000, over: 100_000 } as const;

const SIDE = { front: FrontSide, back: BackSide, both: DoubleSide } as const;

/** A drawable as a three object with a geometry and material of its own; `place` is where it stands in its list. */
export function wrap(drawable: Triangles | WideLines, place: number): Object3D {
	return drawable.kind === "triangles" ? wrapTriangles(drawable, place) : wrapLines(drawable, place);
}

const spent: Mesh[] = [];

/** Gives up what `wrap` made. */
export function dispose(object: Object3D): void {
	if (!(object instanceof Mesh)) throw new TypeError(`"${object.name}" is not a wrapped drawable`);
	spent.push(object);
}

/** Frees what was given up; once the next picture is drawn, so that the programs it shares with that are not compiled anew. */
export function freeSpent(): void {
	for (const { geometry, material } of spent) {
		geometry.dispose();
		(material as Material).dispose();
	}
	spent.length = 0;
}

/** Draws only the first `count` triangles or segments. */
export function setCount(object: Object3D, drawable: Triangles | WideLines, count: number): void {
	const geometry = (object as Mesh).geometry;
	if (drawable.kind === "triangles") geometry.setDrawRange(0, Math.min(count * 3, drawable.index.length));
	else (geometry as LineSegmentsGeometry).instanceCount = Math.min(count, drawable.colour.length);
}

function wrapTriangles(d: Triangles, place: number): Mesh {
	const geometry = new BufferGeometry();
	geometry.setAttribute("position", new BufferAttribute(d.position, 3));
	if (d.lit) geometry.setAttribute("normal", new BufferAttribute(d.normal, 3));
	geometry.setAttribute("color", new BufferAttribute(linearColours(d.colour), 3));
	geometry.setIndex(new BufferAttribute(d.index, 1));
	const translucent = d.opacity < 1;
	const over = d.over === true;
	const look = {
		name: d.name,
		vertexColors: true,
		side: SIDE[d.side],
		transparent: translucent || over,
		opacity: d.opacity,
		depthTest: !over,
		depthWrite: !(translucent || over || d.decal),
		polygonOffset: !over,
		polygonOffsetFactor: d.decal ? 0.5 : 1,
		polygonOffsetUnits: d.decal ? 0.5 : 1,
	};
	const mesh = new Mesh(geometry, d.lit ? new MeshLambertMaterial(look) : new MeshBasicMaterial(look));
	mesh.name = d.name;
	mesh.renderOrder = over ? ORDER.over + place : translucent ? ORDER.translucent + place : d.decal ? ORDER.decal : ORDER.opaque;
	return mesh;
}

function wrapLines(d: WideLines, place: number): LineSegments2 {
	const geometry = new LineSegmentsGeometry();
	geometry.setPositions(d.position);
	geometry.setColors(linearColours(d.colour, 2));
	const over = d.depth === "over";
	const material = new LineMaterial({
		vertexColors: true,
		linewidth: d.width,
		transparent: over || d.opacity < 1,
		opacity: d.opacity,
		depthTest: !over,
		depthWrite: !over && d.opacity === 1,
		dashed: d.dash !== null,
	});
	material.name = d.name;
	if (d.dash) [material.dashSize, material.gapSize] = d.dash;
	const lines = new LineSegments2(geometry, material);
	if (d.dash) lines.computeLineDistances();
	lines.name = d.name;
	lines.renderOrder = over ? ORDER.over + place : d.opacity < 1 ? ORDER.translucent + place : ORDER.lines;
	return lines;
}
