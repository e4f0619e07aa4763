import { useFrame } from "@react-three/fiber";
import type { PerspectiveCamera } from "three";
import type { DropPicture } from "../../src/shape/drop-picture.ts";

/** Puts the picture's camera into three's. */
export function Viewpoint({ picture, camera }: { readonly picture: DropPicture; readonly camera: PerspectiveCamera }) {
	useFrame(({ size }) => {
		const { position: p, basis: b, fovY, near, far } = picture.camera;
		const m = camera.matrix.elements;
		for (let k = 0; k < 3; k++) {
			m[k] = b[k] as number;
			m[4 + k] = b[3 + k] as number;
			m[8 + k] = -(b[6 + k] as number);
			m[12 + k] = p[k] as number;
		}
		camera.matrixWorld.copy(camera.matrix);
		camera.matrixWorldInverse.copy(camera.matrixWorld).invert();
		camera.matrixWorldNeedsUpdate = true;
		camera.fov = (fovY * 180) / Math.PI;
		camera.aspect = size.width / size.height;
		camera.near = near;
		camera.far = far;
		camera.updateProjectionMatrix();
	});
	return null;
}
