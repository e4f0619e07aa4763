import { parseArgs } from "node:util";
import { assessCommand } from "./assess.ts";
import { newCommand } from "./new.ts";
import { schemaCommand } from "./schema.ts";
import { type Call, Refusal } from "./call.ts";
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
		if (values.help || (name === undefined && !values.version)) {
			(values.help ? process.stdout : process.stderr).write(USAGE);
			return values.help ? 0 : 2;
		}
		if (values.version) {
			process.stdout.write(`${TOOL_VERSION}\n`);
			return 0;
		}
		const command = Object.hasOwn(COMMANDS, name as string) ? COMMANDS[name as string] : undefined;
		if (!command) throw new Refusal(`"${name}" is not a command; expected ${Object.keys(COMMANDS).join(", ")}`);
		return await command({ positionals: rest, options: values });
	} catch (error) {
		if (error instanceof Refusal || (error instanceof TypeError && "code" in error && String(error.code).startsWith("ERR_PARSE_ARGS"))) {
			process.stderr.write(`offplumb: ${error.message}\n`);
			return 2;
		}
		throw error;
	}
}
