import { setView } from "../store/navigate.ts";
import { useSession, type View } from "../store/session.ts";

const VIEWS: readonly (readonly [View, string])[] = [
	["eyepoint", "Eyepoint"],
	["external", "External"],
];

/** Which view of the moment is on the stage. */
export function ViewSwitch() {
	const view = useSession((s) => s.view);
	return (
		<fieldset className="switch">
			<legend className="unseen">View</legend>
			{VIEWS.map(([id, name]) => (
				<label key={id}>
					<input type="radio" name="view" value={id} checked={view === id} onChange={() => setView(id)} />
					<span>{name}</span>
				</label>
			))}
		</fieldset>
	);
}
