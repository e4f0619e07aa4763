import { parseArgs } from "node:util";
import { assessCommand } from "./assess.ts";
import { type Call, Refusal } from "./call.ts";
import { newCommand } from "./new.ts";
import { print } from "./print.ts";
import { schemaCommand } from "./schema.ts";
import { TOOL_VERSION } from "./version.ts";

const USAGE = `offplumb: what a spinning habitat does to crew activities

  offplumb assess FILE [--json] [--series] [--csv DIR]   compute everything; a table, or JSON
  offplumb schema                                        the JSON Schema of the layout file
  offplumb new [NAME]                                    a small valid layout to start from

FILE is a *.layout.json, or - for standard input.
Exit status: 0 all assessed and within; 1 something outside; 3 nothing outside, but something not
assessed or resting on an unverified limit; 2 the file could not be read or the call was wrong.
Results support a review. They do not replace the project's human-rating authority, local codes or
licensed practice.
`;

const COMMANDS: Readonly<Record<string, (call: Call) => Promise<number>>> = {
	assess: assessCommand,
	schema: schemaCommand,
	new: newCommand,
};

/** Runs one call; returns the exit status. What went wrong is on standard error, and then nothing is on standard output. */
export async function main(argv: readonly string[]): Promise<number> {
	try {
		const { values, positionals } = parseArgs({
			args: [...argv],
			allowPositionals: true,
			options: {
				json: { type: "boolean" },
				series: { type: "boolean" },
				csv: { type: "string" },
				help: { type: "boolean", short: "h" },
				version: { type: "boolean" },
			},
		});
		const [name, ...rest] = positionals;
		if (values.help || values.version) {
			await print(values.help ? USAGE : `${TOOL_VERSION}\n`);
			return 0;
		}
		if (name === undefined) {
			process.stderr.write(USAGE);
			return 2;
		}
		const command = Object.hasOwn(COMMANDS, name) ? COMMANDS[name] : undefined;
		if (!command) throw new Refusal(`"${name}" is not a command; expected ${Object.keys(COMMANDS).join(", ")}`);
		return await command({ positionals: rest, options: values });
	} catch (error) {
		if (error instanceof Refusal || (error instanceof TypeError && "code" in error && String(error.code).startsWith("ERR_PARSE_ARGS"))) {
			process.stderr.write(`offplumb: ${error.message}\n`);
			return 2;
		}
		// A defect of the tool is not "something outside", which is what Node's own status for it would say.
		process.stderr.write(`offplumb: the tool failed; nothing was assessed\n${error instanceof Error ? error.stack : String(error)}\n`);
		return 2;
	}
}
