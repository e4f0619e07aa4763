import { printNumber, withUnit } from "../../src/quantity/print-quantity.ts";
import { type Derivation, FORMULAS } from "../store/core.ts";

/** How one number came about: formula, values put in, source, what was left out, assumptions. Values are in the formula's own units. */
export function DerivationPanel({ id, derivation }: { readonly id: string; readonly derivation: Derivation }) {
	const formula = FORMULAS[derivation.formula];
	return (
		<div id={id} className="derivation">
			<p className="title">{formula.title}</p>
			<p className="expression">
				{formula.expression.split(/;\s*/).map((line) => (
					<span key={line}>
						<Symbols text={line} />
					</span>
				))}
			</p>
			<table>
				<caption className="unseen">Values put in</caption>
				<tbody>
					{derivation.inputs.map((i) => (
						<tr key={i.symbol}>
							<th scope="row">
								<Symbols text={i.symbol} />
							</th>
							<td>{i.name}</td>
							<td className="value">{typeof i.value === "number" ? withUnit(printNumber(i.value, 4), i.unit) : i.value}</td>
						</tr>
					))}
				</tbody>
			</table>
			{derivation.assumptions.map((text) => (
				<p key={text}>
					<b>Assumed</b> {text}
				</p>
			))}
			<p>
				<b>Left out</b> {formula.dropped}
			</p>
			<p>
				<b>Source</b> {formula.source}
			</p>
		</div>
	);
}

/** Plain-text mathematics with what follows an underscore set low: "R_c" as R with a low c. */
function Symbols({ text }: { readonly text: string }) {
	return text.split(/_(\p{L}+)/u).map((part, i) => {
		const key = `${i} ${part}`;
		return i % 2 === 1 ? <sub key={key}>{part}</sub> : <span key={key}>{part}</span>;
	});
}
