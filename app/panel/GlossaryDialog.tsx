import { Dialog } from "./Dialog.tsx";
import { GLOSSARY } from "./glossary.ts";

export default function GlossaryDialog() {
	return (
		<Dialog title="Glossary" wide>
			<dl className="glossary">
				{GLOSSARY.map(({ term, meaning }) => (
					<div key={term}>
						<dt>{term}</dt>
						<dd>{meaning}</dd>
					</div>
				))}
			</dl>
		</Dialog>
	);
}
