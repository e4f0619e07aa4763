import { change, endGesture, useDocument } from "../store/document.ts";
import { useSelectedCase } from "../store/navigate.ts";
import { dragChange, inputsOf } from "./inputs.ts";
import { NumberField } from "./NumberField.tsx";

/** What goes in: the numbers of the case on the stage, each an undoable edit of the layout. */
export function Inputs() {
	const layout = useDocument((s) => s.layout);
	const c = useSelectedCase();
	if (!c) return null;
	return (
		<section className="inputs" aria-labelledby="inputs-heading">
			<h2 id="inputs-heading">Inputs</h2>
			{inputsOf(layout, c).map((group) => (
				<fieldset key={group.title}>
					<legend>{group.title}</legend>
					{group.inputs.map((input) => (
						<NumberField
							key={input.key}
							label={input.label}
							value={input.value}
							range={input.range}
							step={input.step}
							commit={(value, running) => change(input.change(value), running ? input.key : undefined)}
							rest={endGesture}
						/>
					))}
					{group.title === "Object" && c.file.kind === "drop" && <DragSwitch id={c.id} drag={c.file.drag} />}
				</fieldset>
			))}
		</section>
	);
}

function DragSwitch({ id, drag }: { readonly id: string; readonly drag: boolean }) {
	return (
		<div className="field">
			<label>
				<span className="name">Air drag</span>
				<span className="tick">
					<input type="checkbox" checked={drag} onChange={(e) => change(dragChange(useDocument.getState().layout, id, e.target.checked))} />
					<span>{drag ? "on" : "off"}</span>
				</span>
			</label>
		</div>
	);
}
