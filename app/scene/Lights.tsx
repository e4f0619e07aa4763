import { useEffect, useMemo } from "react";
import { Color, DirectionalLight, HemisphereLight } from "three";
import { LIGHT } from "../../src/shape/light.ts";

/** The one light of the stage, by the numbers the raster reads. */
export function Lights() {
	const lights = useMemo(() => {
		const hemisphere = new HemisphereLight(new Color(1, 1, 1), new Color().setScalar(LIGHT.ground / LIGHT.sky), LIGHT.sky);
		const lamp = new DirectionalLight(new Color(1, 1, 1), LIGHT.lamp);
		lamp.position.set(...LIGHT.lampDirection);
		return [hemisphere, lamp] as const;
	}, []);
	useEffect(
		() => () => {
			for (const light of lights) light.dispose();
		},
		[lights],
	);
	return lights.map((light) => <primitive key={light.type} object={light} />);
}
