import { dismissRefused, useDocument } from "../store/document.ts";
import { Icon } from "./Icon.tsx";

/** Why a file was not opened, every problem at once; the layout on the stage stays. */
export function Refused() {
	const refused = useDocument((s) => s.refused);
	const title = useDocument((s) => s.layout.title);
	if (!refused) return null;
	const count = refused.problems.length;
	return (
		<section className="refused" role="alert" aria-labelledby="refused-heading">
			<header>
				<h2 id="refused-heading">
					{refused.name} was not opened: {count} {count === 1 ? "problem" : "problems"}
				</h2>
				<button type="button" className="quiet square" aria-label="Close the list of problems" onClick={dismissRefused}>
					<Icon name="close" />
				</button>
			</header>
			<p className="muted">“{title}” stays as it is.</p>
			{/* biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard. */}
			<section className="scroll" aria-labelledby="refused-heading" tabIndex={0}>
				<table>
					<thead>
						<tr>
							<th scope="col">Where</th>
							<th scope="col">Stands there</th>
							<th scope="col">Expected</th>
						</tr>
					</thead>
					<tbody>
						{refused.problems.map((p) => (
							<tr key={`${p.path} ${p.value} ${p.expected}`}>
								<td>{p.path}</td>
								<td>{p.value}</td>
								<td>
									{p.expected}
									{p.nearest && <> (nearest: {p.nearest})</>}
								</td>
							</tr>
						))}
					</tbody>
				</table>
			</section>
		</section>
	);
}
