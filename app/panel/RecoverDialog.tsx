import { useEffect, useState } from "react";
import { forgetCopy, type KeptCopy, keptCopies } from "../platform/autosave.ts";
import { openText } from "../platform/files.ts";
import { refuseFile } from "../store/document.ts";
import { openDialog } from "../store/session.ts";
import { Dialog } from "./Dialog.tsx";

type Copies =
	| { readonly state: "reading" }
	| { readonly state: "failed"; readonly reason: string }
	| { readonly state: "read"; readonly copies: readonly KeptCopy[] };

/** What this browser kept of earlier work, newest first. */
export default function RecoverDialog() {
	const [found, setFound] = useState<Copies>({ state: "reading" });
	const read = (): void => {
		keptCopies().then(
			(copies) => setFound({ state: "read", copies }),
			(error: unknown) => setFound({ state: "failed", reason: String(error) }),
		);
	};
	useEffect(read, []);
	return (
		<Dialog title="Recover kept work" wide>
			{found.state === "failed" && <p>This browser gives no access to kept work: {found.reason}.</p>}
			{found.state === "read" && found.copies.length === 0 && <p>Nothing is kept yet. A copy is kept a moment after each edit.</p>}
			{found.state === "read" && (
				<ul className="copies">
					{found.copies.map((copy) => (
						<li key={copy.id}>
							<span>
								<strong>{copy.title}</strong>
								<span className="muted">
									{new Date(copy.at).toLocaleString()}
									{copy.file ? `, ${copy.file}` : ""}
									{copy.saved ? ", also saved to a file" : ", not saved to a file"}
								</span>
							</span>
							<button
								type="button"
								onClick={() => {
									const problems = openText(copy.text, null);
									if (problems.length > 0) refuseFile(`the kept copy of ${copy.title}`, problems);
									openDialog(null);
								}}
							>
								Open
							</button>
							<button type="button" className="quiet" aria-label={`Forget ${copy.title}`} onClick={() => forgetCopy(copy.id).then(read)}>
								Forget
							</button>
						</li>
					))}
				</ul>
			)}
		</Dialog>
	);
}
