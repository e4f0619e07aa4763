#!/usr/bin/env node
import { main } from "./main.ts";

// What could not be written is told where it is written; unheard, the event would end the process.
for (const stream of [process.stdout, process.stderr]) stream.on("error", () => {});
process.exitCode = await main(process.argv.slice(2));
