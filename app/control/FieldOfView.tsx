import { useId, useState, useSyncExternalStore } from "react";
import type { View } from "../../src/shape/drop-picture.ts";
import { FOV_DEG, fieldOfView, onLook, setFieldOfView } from "./look.ts";

/** The vertical field of view, shown and editable; what is typed counts once it is in range. */
export function FieldOfView({ view }: { readonly view: View }) {
	const id = useId();
	const degrees = useSyncExternalStore(onLook, () => Math.round(fieldOfView(view)));
	const [draft, setDraft] = useState<string | null>(null);
	return (
		<p className="field-of-view">
			<label htmlFor={id}>Field of view</label>
			<input
				id={id}
				type="number"
				min={FOV_DEG.least}
				max={FOV_DEG.most}
				step={1}
				value={draft ?? degrees}
				onChange={(e) => {
					const value = e.target.valueAsNumber;
					const fits = value >= FOV_DEG.least && value <= FOV_DEG.most;
					setDraft(fits ? null : e.target.value);
					if (fits) setFieldOfView(view, value);
				}}
				onBlur={() => setDraft(null)}
			/>
			<span>°</span>
		</p>
	);
}
