import { act, type ReactElement } from "react";
import { createRoot, type Root } from "react-dom/client";
import { afterEach } from "vitest";

/** What jsdom lacks and the panels ask for. */
(globalThis as { IS_REACT_ACT_ENVIRONMENT?: boolean }).IS_REACT_ACT_ENVIRONMENT = true;
export const media = { matches: false };
globalThis.matchMedia = (query: string) =>
	({ matches: media.matches, media: query, addEventListener: () => {}, removeEventListener: () => {} }) as unknown as MediaQueryList;
HTMLDialogElement.prototype.showModal = function showModal(this: HTMLDialogElement) {
	this.open = true;
};
HTMLDialogElement.prototype.close = function close(this: HTMLDialogElement) {
	this.open = false;
	this.dispatchEvent(new Event("close"));
};

const roots: Root[] = [];
afterEach(() => {
	act(() => {
		for (const root of roots.splice(0)) root.unmount();
	});
	document.body.replaceChildren();
});

/** Draws an element into the page; unmounted after the test. */
export function draw(element: ReactElement): HTMLElement {
	const host = document.createElement("div");
	document.body.append(host);
	const root = createRoot(host);
	roots.push(root);
	act(() => root.render(element));
	return host;
}

/** The one element with this role and accessible name (label, aria-label or text). Throws where there is none or more than one. */
export function named(role: string, name: string, within: ParentNode = document): HTMLElement {
	const native: Record<string, string> = {
		button: "button",
		combobox: "select",
		checkbox: "input[type=checkbox]",
		slider: "input[type=range]",
	};
	const found = [...within.querySelectorAll<HTMLElement>(`[role=${role}]${native[role] ? `, ${native[role]}` : ""}`)].filter(
		(e) => nameOf(e) === name,
	);
	const [only] = found;
	if (!only || found.length > 1) throw new RangeError(`${found.length} elements of role ${role} are named "${name}"`);
	return only;
}

const nameOf = (e: HTMLElement): string => {
	const label = (e as HTMLInputElement).labels?.[0]?.querySelector(".name");
	return (e.getAttribute("aria-label") ?? label?.textContent ?? e.textContent ?? "").replace(/\u00A0/g, " ").trim();
};

export const press = (target: EventTarget, key: string, more: KeyboardEventInit = {}): KeyboardEvent => {
	const event = new KeyboardEvent("keydown", { key, bubbles: true, cancelable: true, ...more });
	act(() => {
		target.dispatchEvent(event);
	});
	return event;
};

export const click = (target: HTMLElement): void => act(() => target.click());

/** Types over what stands in a field, as React hears it. */
export function type(field: HTMLInputElement, text: string): void {
	const set = Object.getOwnPropertyDescriptor(HTMLInputElement.prototype, "value")?.set;
	act(() => {
		set?.call(field, text);
		field.dispatchEvent(new Event("input", { bubbles: true }));
	});
}

export const textOf = (e: Element | null): string => (e?.textContent ?? "").replace(/[\u00A0\u202F]/g, " ");
