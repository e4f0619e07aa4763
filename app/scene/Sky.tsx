import { useFrame, useThree } from "@react-three/fiber";
import { useEffect, useMemo } from "react";
import { Color } from "three";
import type { Stars } from "../../src/shape/drawable.ts";
import type { DropPicture } from "../../src/shape/drop-picture.ts";
import { PALETTE } from "../../src/shape/palette.ts";
import { turnStars, wrapStars } from "./stars.ts";

/** The stars, turned by the spin and nothing else, before a dark sky. */
export function Sky({ picture, stars }: { readonly picture: DropPicture; readonly stars: Stars }) {
	const points = useMemo(() => wrapStars(stars), [stars]);
	const scene = useThree((s) => s.scene);
	useEffect(() => {
		scene.background = new Color(PALETTE.sky);
		return () => {
			scene.background = null;
		};
	}, [scene]);
	useEffect(
		() => () => {
			points.geometry.dispose();
			points.material.dispose();
		},
		[points],
	);
	useFrame((state) => turnStars(points, picture.stage.skyRotation, state.viewport.dpr));
	return <primitive object={points} />;
}
