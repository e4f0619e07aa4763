import { Component, lazy, type ReactNode, Suspense } from "react";
import { type DialogName, openDialog, say, useSession } from "../store/session.ts";

/** Not needed for the first picture. */
const LOAD = {
	caution: () => import("./CautionDialog.tsx"),
	glossary: () => import("./GlossaryDialog.tsx"),
	commands: () => import("./CommandsDialog.tsx"),
	recover: () => import("./RecoverDialog.tsx"),
} satisfies Readonly<Record<DialogName, () => Promise<unknown>>>;

const DIALOGS: Readonly<Record<DialogName, ReturnType<typeof lazy>>> = {
	caution: lazy(LOAD.caution),
	glossary: lazy(LOAD.glossary),
	commands: lazy(LOAD.commands),
	recover: lazy(LOAD.recover),
};

/** Fetches the dialogs ahead, so that they open even when the server is gone. Rejects where it already is. */
export const loadDialogs = (): Promise<unknown> => Promise.all(Object.values(LOAD).map((load) => load()));

export function Dialogs() {
	const name = useSession((s) => s.dialog);
	if (name === null) return null;
	const Shown = DIALOGS[name];
	return (
		<Guard key={name}>
			<Suspense fallback={null}>
				<Shown />
			</Suspense>
		</Guard>
	);
}

/** A dialog that cannot be loaded closes with a notice and leaves the rest of the page alone. */
class Guard extends Component<{ readonly children: ReactNode }, { readonly failed: boolean }> {
	override state = { failed: false };
	static getDerivedStateFromError(): { failed: boolean } {
		return { failed: true };
	}
	override componentDidCatch(error: unknown): void {
		openDialog(null);
		say(`This part of the page could not be loaded: ${error instanceof Error ? error.message : error}.`);
	}
	override render(): ReactNode {
		return this.state.failed ? null : this.props.children;
	}
}
