import { play, setView } from "../store/navigate.ts";
import { openDialog, useSession } from "../store/session.ts";
import { Dialog } from "./Dialog.tsx";

/** Asked once, before the first Eyepoint run. */
export default function CautionDialog() {
	return (
		<Dialog title="Before the picture turns">
			<p>
				Eyepoint shows the bay through the crew member’s eyes. When it plays, the view moves and the stars outside turn with the spin. That
				can bring on dizziness or nausea. <strong>Stop if you feel unwell</strong>: Space pauses, and External shows the same moment from
				outside.
			</p>
			<p>
				<strong>If you have photosensitive epilepsy, do not use streaks or flashing views.</strong>
			</p>
			<p className="muted">Your answer is remembered in this browser.</p>
			<div className="dialog-actions">
				<button
					type="button"
					className="primary"
					data-first
					onClick={() => {
						useSession.setState({ cautionAccepted: true, dialog: null });
						play();
					}}
				>
					Play in Eyepoint
				</button>
				<button
					type="button"
					onClick={() => {
						openDialog(null);
						setView("external");
					}}
				>
					Look from External
				</button>
				<button type="button" className="quiet" onClick={() => openDialog(null)}>
					Not now
				</button>
			</div>
		</Dialog>
	);
}
