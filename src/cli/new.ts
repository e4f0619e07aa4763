import { writeLayout } from "../layout/canonical.ts";
import { newLayout } from "../layout/new.ts";
import { type Call, only } from "./call.ts";
import { print } from "./print.ts";

export async function newCommand(call: Call): Promise<number> {
	only(call, "new", [], 1);
	await print(writeLayout(newLayout(call.positionals[0] ?? "New layout")));
	return 0;
}
