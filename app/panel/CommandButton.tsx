import type { ComponentProps } from "react";
import type { Command } from "../command/command.ts";
import { keysOf, printStroke } from "../command/keyboard.ts";
import { useDocument } from "../store/document.ts";
import { useSession } from "../store/session.ts";
import { Icon } from "./Icon.tsx";

/** A command as a button with a sign; name and keys show on hover and are read out. Follows both stores, as names and availability hang on them. */
export function CommandButton({
	command,
	icon,
	className = "quiet square",
}: {
	readonly command: Command;
	readonly icon: ComponentProps<typeof Icon>["name"];
	readonly className?: string;
}) {
	useDocument();
	useSession();
	const [stroke] = keysOf(command);
	return (
		<button
			type="button"
			className={className}
			aria-label={command.name()}
			aria-keyshortcuts={stroke?.replace("Mod", "Control")}
			title={stroke ? `${command.name()} (${printStroke(stroke)})` : command.name()}
			disabled={!command.enabled()}
			onClick={() => command.run()}
		>
			<Icon name={icon} />
		</button>
	);
}
