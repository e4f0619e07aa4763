// @ts-check
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { prepare, root } from "./house.mjs";

await prepare({ builds: ["cli"] });
const bundle = join(root, "dist/offplumb.mjs");
// npm moves to the checkout; paths on the command line are meant from where the user stands.
process.chdir(process.env.INIT_CWD ?? process.cwd());
process.argv[1] = bundle;
await import(pathToFileURL(bundle).href);
