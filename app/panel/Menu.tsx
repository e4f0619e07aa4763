import { type KeyboardEvent, useEffect, useId, useRef, useState } from "react";
import { COMMANDS } from "../command/all.ts";
import { keysOf, printStroke } from "../command/keyboard.ts";
import { Icon } from "./Icon.tsx";

/** Every command with its key, by group. */
export function Menu() {
	const [open, setOpen] = useState(false);
	const root = useRef<HTMLDivElement>(null);
	const list = useId();
	useEffect(() => {
		if (!open) return;
		root.current?.querySelector<HTMLElement>("[role=menuitem]:not([disabled])")?.focus();
		const onPress = (e: PointerEvent): void => {
			if (e.target instanceof Node && !root.current?.contains(e.target)) setOpen(false);
		};
		addEventListener("pointerdown", onPress);
		return () => removeEventListener("pointerdown", onPress);
	}, [open]);
	const close = (): void => {
		setOpen(false);
		root.current?.querySelector("button")?.focus();
	};
	const onKeyDown = (e: KeyboardEvent): void => {
		if (!open) return;
		if (e.key === "Tab") setOpen(false);
		const items = [...(root.current?.querySelectorAll<HTMLElement>("[role=menuitem]:not([disabled])") ?? [])];
		const to = nextItem(e.key, items.indexOf(document.activeElement as HTMLElement), items.length);
		if (e.key === "Escape") close();
		else if (to !== undefined) items[to]?.focus();
		else return;
		e.preventDefault();
	};
	const groups = [...new Set(COMMANDS.map((c) => c.group))];
	return (
		// biome-ignore lint/a11y/noStaticElementInteractions: hears the keys of the menu inside it.
		<div ref={root} className="menu" onKeyDown={onKeyDown}>
			<button
				type="button"
				className="quiet labelled"
				aria-haspopup="menu"
				aria-expanded={open}
				aria-controls={list}
				onClick={() => setOpen(!open)}
			>
				<Icon name="menu" />
				<span>Menu</span>
			</button>
			{open && (
				<div id={list} role="menu" aria-label="Commands">
					{groups.map((group) => (
						<fieldset key={group} aria-label={group}>
							{COMMANDS.filter((c) => c.group === group).map((c) => {
								const [stroke] = keysOf(c);
								return (
									<button
										key={c.id}
										type="button"
										role="menuitem"
										tabIndex={-1}
										disabled={!c.enabled()}
										onClick={() => {
											close();
											c.run();
										}}
									>
										<span>{c.name()}</span>
										{stroke && <kbd>{printStroke(stroke)}</kbd>}
									</button>
								);
							})}
						</fieldset>
					))}
				</div>
			)}
		</div>
	);
}

function nextItem(key: string, at: number, count: number): number | undefined {
	switch (key) {
		case "ArrowDown":
			return (at + 1) % count;
		case "ArrowUp":
			return (at - 1 + count) % count;
		case "Home":
			return 0;
		case "End":
			return count - 1;
		default:
			return undefined;
	}
}
