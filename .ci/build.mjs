// @ts-check
import { ensureBuilt, ensureInstalled } from "./house.mjs";

await ensureInstalled();
await ensureBuilt("app", { force: true });
await ensureBuilt("cli", { force: true });
