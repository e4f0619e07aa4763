import { useFrame } from "@react-three/fiber";
import { useEffect, useMemo } from "react";
import type { Part } from "../../src/shape/drawable.ts";
import { dispose, setCount, wrap } from "./wrap.ts";

/** What moves, drawn in the order `from`, `from` + 1, …: each frame every part's matrix, count and visibility are copied onto its object. */
export function Moving({
	parts,
	from,
	onReady,
}: {
	readonly parts: readonly Part[];
	readonly from: number;
	readonly onReady?: () => void;
}) {
	const objects = useMemo(
		() =>
			parts.map((part, i) => {
				const object = wrap(part.drawable, from + i);
				object.matrixAutoUpdate = false;
				object.frustumCulled = false;
				return object;
			}),
		[parts, from],
	);
	useEffect(() => {
		onReady?.();
		return () => {
			for (const object of objects) dispose(object);
		};
	}, [objects, onReady]);
	useFrame(() => {
		for (let i = 0; i < parts.length; i++) {
			const part = parts[i] as Part;
			const object = objects[i] as (typeof objects)[number];
			object.visible = part.visible !== false && part.count !== 0;
			if (!object.visible) continue;
			object.matrix.fromArray(part.matrix);
			object.matrixWorldNeedsUpdate = true;
			if (part.count !== undefined) setCount(object, part.drawable, part.count);
		}
	});
	return objects.map((object) => <primitive key={object.uuid} object={object} />);
}
