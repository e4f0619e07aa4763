// @ts-check
import { join } from "node:path";
import { prepare, refuse, root } from "./house.mjs";
import { serve } from "./serve.mjs";

const given = process.env.PORT ?? "";
if (given !== "" && !(/^\d{1,5}$/.test(given) && Number(given) >= 1 && Number(given) <= 65_535))
	refuse(`PORT is "${given}"; expected a number from 1 to 65535`);
const server = await serve(join(root, "dist/app"), Number(given)).catch((error) => {
	if (error.code === "EADDRINUSE") refuse(`port ${given} is taken; give another in PORT, or none to pick a free one`);
	if (error.code === "EACCES") refuse(`port ${given} may not be opened by this user; give another in PORT, or none to pick a free one`);
	throw error;
});
await prepare({ builds: ["app"] });
process.stdout.write(`Offplumb is at ${server.url}\n`);
