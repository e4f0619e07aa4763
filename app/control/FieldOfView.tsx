import { useId, useSyncExternalStore } from "react";
import type { View } from "../../src/shape/drop-picture.ts";
import { FOV_DEG, fieldOfView, onLook, setFieldOfView } from "./look.ts";

/** The vertical field of view, shown and editable. */
export function FieldOfView({ view }: { readonly view: View }) {
	const id = useId();
	const degrees = useSyncExternalStore(onLook, () => Math.round(fieldOfView(view)));
	return (
		<p className="field-of-view">
			<label htmlFor={id}>Field of view</label>
			<input
				id={id}
				type="number"
				min={FOV_DEG.least}
				max={FOV_DEG.most}
				step={1}
				value={degrees}
				onChange={(e) => setFieldOfView(view, e.target.valueAsNumber)}
			/>
			<span>°</span>
		</p>
	);
}
