import { lazy, Suspense } from "react";
import { type DialogName, useSession } from "../store/session.ts";

/** Loaded when first asked for. */
const DIALOGS: Readonly<Record<DialogName, ReturnType<typeof lazy>>> = {
	caution: lazy(() => import("./CautionDialog.tsx")),
	glossary: lazy(() => import("./GlossaryDialog.tsx")),
	commands: lazy(() => import("./CommandsDialog.tsx")),
	recover: lazy(() => import("./RecoverDialog.tsx")),
};

export function Dialogs() {
	const name = useSession((s) => s.dialog);
	if (name === null) return null;
	const Shown = DIALOGS[name];
	return (
		<Suspense fallback={null}>
			<Shown key={name} />
		</Suspense>
	);
}
