// @ts-check
import { pathToFileURL } from "node:url";
import { ensureBuilt, ensureInstalled } from "./house.mjs";

await ensureInstalled();
const bundle = await ensureBuilt("cli");
// npm moves to the checkout; paths on the command line are meant from where the user stands.
process.chdir(process.env["INIT_CWD"] ?? process.cwd());
process.argv[1] = bundle;
await import(pathToFileURL(bundle).href);
