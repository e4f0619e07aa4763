import { useFrame } from "@react-three/fiber";
import { useEffect, useMemo } from "react";
import type { DropPicture } from "../../src/shape/drop-picture.ts";
import { dispose, wrap } from "./wrap.ts";

/** What does not move: bay and elements. Faces seen from behind are left out. */
export function Still({ picture }: { readonly picture: DropPicture }) {
	const drawables = picture.stage.still;
	const objects = useMemo(
		() =>
			drawables.map((d, i) => {
				if (d.kind === "stars") throw new TypeError("stars are drawn by the sky");
				const object = wrap(d, i);
				object.matrixAutoUpdate = false;
				return object;
			}),
		[drawables],
	);
	useEffect(
		() => () => {
			for (const object of objects) dispose(object);
		},
		[objects],
	);
	useFrame(() => {
		for (let i = 0; i < objects.length; i++) (objects[i] as (typeof objects)[number]).visible = picture.seen[i] === 1;
	});
	return objects.map((object) => <primitive key={object.uuid} object={object} />);
}
