import { AdditiveBlending, BufferAttribute, BufferGeometry, Matrix3, Points, ShaderMaterial } from "three";
import type { Stars } from "../../src/shape/drawable.ts";

const VERTEX = /* glsl */ `
attribute float diameter;
attribute vec3 light;
uniform mat3 sky;
uniform float ratio;
varying vec3 vLight;
void main() {
	vec4 clip = projectionMatrix * vec4(mat3(viewMatrix) * (sky * position), 1.0);
	gl_Position = clip.w > 0.0 ? vec4(clip.xy, 0.0, clip.w) : vec4(2.0, 2.0, 2.0, 1.0);
	gl_PointSize = min(diameter * ratio + 1.2, 16.0);
	vLight = light;
}`;

const FRAGMENT = /* glsl */ `
varying vec3 vLight;
void main() {
	vec2 d = (gl_PointCoord - 0.5) * 2.0;
	float disc = max(0.0, 1.0 - dot(d, d));
	gl_FragColor = vec4(vLight * disc * disc, 1.0);
	#include <colorspace_fragment>
}`;

/** The stars as points at no distance, drawn before everything else. */
export function wrapStars(stars: Stars): Points<BufferGeometry, ShaderMaterial> {
	const geometry = new BufferGeometry();
	geometry.setAttribute("position", new BufferAttribute(stars.direction, 3));
	geometry.setAttribute("diameter", new BufferAttribute(stars.size, 1));
	geometry.setAttribute("light", new BufferAttribute(stars.light, 3));
	const material = new ShaderMaterial({
		name: stars.name,
		vertexShader: VERTEX,
		fragmentShader: FRAGMENT,
		uniforms: { sky: { value: new Matrix3() }, ratio: { value: 1 } },
		depthTest: false,
		depthWrite: false,
		transparent: false,
		blending: AdditiveBlending,
	});
	const points = new Points(geometry, material);
	points.name = stars.name;
	points.frustumCulled = false;
	points.renderOrder = -1;
	points.raycast = () => {};
	return points;
}

/** Turns the sky: ICRS → stage, 9 numbers, row by row. */
export function turnStars(points: Points<BufferGeometry, ShaderMaterial>, rotation: Float64Array, pixelRatio: number): void {
	const r = rotation;
	(points.material.uniforms.sky as { value: Matrix3 }).value.set(
		r[0] as number,
		r[1] as number,
		r[2] as number,
		r[3] as number,
		r[4] as number,
		r[5] as number,
		r[6] as number,
		r[7] as number,
		r[8] as number,
	);
	(points.material.uniforms.ratio as { value: number }).value = pixelRatio;
}
