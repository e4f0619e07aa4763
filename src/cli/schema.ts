import { layoutJsonSchema } from "../layout/json-schema.ts";
import { type Call, only } from "./call.ts";
import { print } from "./print.ts";

export async function schemaCommand(call: Call): Promise<number> {
	only(call, "schema", [], 0);
	await print(`${JSON.stringify(layoutJsonSchema(), null, 2)}\n`);
	return 0;
}
