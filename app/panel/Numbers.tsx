import { useId } from "react";
import { SUMMARY_KEYS } from "../../src/activity/keys.ts";
import type { AssessedCase } from "../store/core.ts";
import type { Printer } from "../store/print.ts";
import { useSession } from "../store/session.ts";
import { DerivationPanel } from "./DerivationPanel.tsx";
import { nameOf, struckWords } from "./words.ts";

/** What summary keys are called on screen, in the order shown: those always in sight, and those on request. */
const FIRST: Readonly<Record<string, string>> = {
	flight_time_s: "Time to the impact",
	landing_speed_mps: "Speed at the impact",
	landing_angle_deg: "Arrives off vertical",
	equal_earth_drop_m: "Equal drop on Earth",
	impact_energy_J: "Energy at the impact",
};
const REST: Readonly<Record<string, string>> = {
	struck: "Strikes",
	landing_prograde_m: "Along the deck, − against spin",
	landing_axial_m: "Along the axis",
	landing_radius_m: "Radius of the landing",
	landing_from_feet_prograde_m: "From the feet, with spin",
	landing_from_feet_axial_m: "From the feet, axial",
	passed: "Hatches passed",
};

/** The numbers of the case but the headline's, each opening to its derivation. */
export function Numbers({ c, headline, print }: { readonly c: AssessedCase; readonly headline: string | null; readonly print: Printer }) {
	const open = useSession((s) => s.derivation);
	const units = SUMMARY_KEYS[c.kind];
	const keys = Object.keys(units).filter((key) => key !== headline);
	const first = Object.keys(FIRST).filter((key) => keys.includes(key));
	const rest = keys.filter((key) => !(key in FIRST));
	const row = (key: string) => (
		<Row
			key={key}
			name={FIRST[key] ?? REST[key] ?? nameOf(key)}
			summaryKey={key}
			c={c}
			unit={units[key] ?? ""}
			open={open === key}
			print={print}
		/>
	);
	return (
		<div className="numbers">
			<ul aria-label="Numbers of this case">{first.map(row)}</ul>
			{rest.length > 0 && (
				<details open={open !== null && rest.includes(open) ? true : undefined}>
					<summary>More numbers</summary>
					<ul aria-label="More numbers of this case">{rest.map(row)}</ul>
				</details>
			)}
		</div>
	);
}

interface RowProps {
	readonly name: string;
	readonly summaryKey: string;
	readonly c: AssessedCase;
	readonly unit: string;
	readonly open: boolean;
	readonly print: Printer;
}

function Row({ name, summaryKey, c, unit, open, print }: RowProps) {
	const id = useId();
	const derivation = c.derivations[summaryKey];
	const reason = c.reasons[summaryKey];
	const value = valueWords(c, summaryKey, unit, print);
	if (!derivation)
		return (
			<li className="row">
				<span>{name}</span>
				<span className="value">{value}</span>
				{reason && <p className="muted">{reason}</p>}
			</li>
		);
	return (
		<li>
			<button
				type="button"
				className="row"
				aria-expanded={open}
				aria-controls={open ? id : undefined}
				onClick={() => useSession.setState({ derivation: open ? null : summaryKey })}
			>
				<span>{name}</span>
				<span className="value">{value}</span>
			</button>
			{open && <DerivationPanel id={id} derivation={derivation} />}
		</li>
	);
}

function valueWords(c: AssessedCase, key: string, unit: string, print: Printer): string {
	const value = c.summary[key];
	if (value === null || value === undefined) return "none";
	if (typeof value === "number") return print(value, unit);
	if (typeof value === "string") return key === "struck" ? struckWords(c) : value;
	return value.length === 0 ? "none" : value.map((v) => (typeof v === "number" ? print(v, unit) : v)).join(", ");
}
