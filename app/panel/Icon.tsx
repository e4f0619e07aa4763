const PATHS = {
	play: "M5 3.5v9l7.5-4.5z",
	pause: "M4.5 3.5h2.5v9H4.5zM9 3.5h2.5v9H9z",
	back: "M11.5 3.5v9L5.5 8zM3.5 3.5H5v9H3.5z",
	on: "M4.5 3.5v9l6-4.5zM11 3.5h1.5v9H11z",
	undo: "M6.5 2.5 2.5 6.5l4 4V7.8c3 0 5 .9 6.5 3.2-.4-3.6-2.6-6-6.5-6.3z",
	redo: "M9.5 2.5l4 4-4 4V7.8c-3 0-5 .9-6.5 3.2.4-3.6 2.6-6 6.5-6.3z",
	menu: "M2.5 4h11v1.4h-11zM2.5 7.3h11v1.4h-11zM2.5 10.6h11V12h-11z",
	close: "M4 3 8 7l4-4 1 1-4 4 4 4-1 1-4-4-4 4-1-1 4-4-4-4z",
} as const;

/** A 16 px sign in the colour of its text; the button around it carries the name. */
export function Icon({ name }: { readonly name: keyof typeof PATHS }) {
	return (
		<svg className="icon" viewBox="0 0 16 16" width="16" height="16" aria-hidden="true">
			<path d={PATHS[name]} fill="currentColor" />
		</svg>
	);
}
