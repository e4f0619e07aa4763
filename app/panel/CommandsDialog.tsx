import { useState } from "react";
import { COMMANDS } from "../command/all.ts";
import type { Command } from "../command/command.ts";
import { isSingle, keysOf, printStroke, strokeOf } from "../command/keyboard.ts";
import { openDialog, useSession } from "../store/session.ts";
import { Dialog } from "./Dialog.tsx";

/** Keys that are not commands: they belong to what has the focus. */
const OF_PARTS = [
	["Time rule", "← →", "one step, with Shift ten"],
	["Time rule", "Home, End", "first and last instant"],
	["Number field", "↑ ↓", "one step"],
	["Number field", "Page up, Page down", "ten steps"],
	["Number field", "Enter", "takes what was typed; a unit may follow, as in 6 ft 2 in"],
	["Number field", "Esc", "puts the value back"],
] as const;

/** Every command, to run or to look up its key; single-letter keys can be changed. */
export default function CommandsDialog() {
	const [filter, setFilter] = useState("");
	const keymap = useSession((s) => s.keymap);
	const wanted = filter.trim().toLowerCase();
	const shown = COMMANDS.filter((c) => c.id !== "commands" && `${c.group} ${c.name()}`.toLowerCase().includes(wanted));
	const groups = [...new Set(shown.map((c) => c.group))];
	const first = shown.find((c) => c.enabled());
	return (
		<Dialog title="Commands and keys" wide>
			<input
				type="search"
				data-first
				className="filter"
				aria-label="Filter commands"
				placeholder="Filter, Enter runs the first"
				value={filter}
				onChange={(e) => setFilter(e.target.value)}
				onKeyDown={(e) => e.key === "Enter" && first && run(first)}
			/>
			{groups.map((group) => (
				<section key={group} className="commands">
					<h3>{group}</h3>
					<ul>
						{shown
							.filter((c) => c.group === group)
							.map((c) => (
								<li key={c.id}>
									<button type="button" className="row" disabled={!c.enabled()} onClick={() => run(c)}>
										{c.name()}
									</button>
									<Keys command={c} keymap={keymap} />
								</li>
							))}
					</ul>
				</section>
			))}
			{shown.length === 0 && <p>No command has “{filter}” in its name.</p>}
			<p className="muted">
				Keys of one character are heard while the stage has the focus. Click one and press another to change it; Delete leaves it unused.
			</p>
			<section className="commands">
				<h3>In the parts of the screen</h3>
				<ul>
					{OF_PARTS.map(([part, key, does]) => (
						<li key={part + key}>
							<span className="row">
								{part}: {does}
							</span>
							<kbd>{key}</kbd>
						</li>
					))}
				</ul>
			</section>
		</Dialog>
	);
}

function run(c: Command): void {
	openDialog(null);
	c.run();
}

function Keys({ command, keymap }: { readonly command: Command; readonly keymap: Readonly<Record<string, string>> }) {
	const [taken, setTaken] = useState<string | null>(null);
	const own = command.keys.find(isSingle);
	const now = keysOf(command, keymap);
	const single = now.find(isSingle) ?? "";
	const set = (stroke: string): void => {
		const other = COMMANDS.find((c) => c.id !== command.id && keysOf(c).includes(stroke));
		setTaken(other ? `${printStroke(stroke)} is “${other.name()}”` : null);
		if (other) return;
		const { [command.id]: _, ...rest } = keymap;
		useSession.setState({ keymap: stroke === own ? rest : { ...rest, [command.id]: stroke } });
	};
	return (
		<span className="keys">
			{taken && <span role="alert">{taken}</span>}
			{now
				.filter((k) => !isSingle(k))
				.map((k) => (
					<kbd key={k}>{printStroke(k)}</kbd>
				))}
			{own !== undefined && (
				<input
					className="key"
					readOnly
					aria-label={`Key of ${command.name()}`}
					value={single === "" ? "none" : printStroke(single)}
					onKeyDown={(e) => {
						const stroke = strokeOf(e.nativeEvent);
						const unset = e.key === "Delete" || e.key === "Backspace";
						if (!isSingle(stroke) || !(unset || e.key.length === 1)) return;
						e.preventDefault();
						set(unset ? "" : stroke);
					}}
				/>
			)}
		</span>
	);
}
