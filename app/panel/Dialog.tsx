import { type ReactNode, useEffect, useId, useRef } from "react";
import { openDialog } from "../store/session.ts";
import { Icon } from "./Icon.tsx";

/** A modal dialog over the page; Esc, its cross and a press outside close it, and the focus goes back where it was. It begins at `data-first`. */
export function Dialog({
	title,
	children,
	wide = false,
}: {
	readonly title: string;
	readonly children: ReactNode;
	readonly wide?: boolean;
}) {
	const ref = useRef<HTMLDialogElement>(null);
	const heading = useId();
	const before = useRef<Element | null>(null);
	useEffect(() => {
		const dialog = ref.current;
		before.current ??= document.activeElement;
		if (dialog && !dialog.open) dialog.showModal();
		dialog?.querySelector<HTMLElement>("[data-first]")?.focus();
		return () => {
			if (before.current instanceof HTMLElement) before.current.focus();
		};
	}, []);
	return (
		// biome-ignore lint/a11y/useKeyWithClickEvents: Esc closes the dialog for the keyboard.
		<dialog
			ref={ref}
			className={wide ? "dialog wide" : "dialog"}
			aria-labelledby={heading}
			onClose={() => openDialog(null)}
			onClick={(e) => e.target === ref.current && ref.current.close()}
		>
			<div className="dialog-body">
				<header>
					<h2 id={heading}>{title}</h2>
					<button type="button" className="quiet square" aria-label="Close" onClick={() => ref.current?.close()}>
						<Icon name="close" />
					</button>
				</header>
				{children}
			</div>
		</dialog>
	);
}
