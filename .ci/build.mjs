// @ts-check
import { prepare } from "./house.mjs";

await prepare({ builds: ["app", "cli"], force: true });
