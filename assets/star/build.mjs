/** Packs d3-celestial's stars to V 6.0 into catalogue.bin: `node assets/star/build.mjs`. */
import { createHash } from "node:crypto";
import { readFileSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import { fileURLToPath } from "node:url";
import { runnerImport } from "vite";

const here = (name) => fileURLToPath(new URL(name, import.meta.url));
const source = readFileSync(createRequire(import.meta.url).resolve("d3-celestial/data/stars.6.json"));
const { module } = await runnerImport(here("pack.ts"), { logLevel: "error", configFile: false });
const { bytes, withoutColour } = module.packCatalogue(JSON.parse(source.toString("utf8")));
writeFileSync(here("catalogue.bin"), bytes);

const sha256 = (data) => createHash("sha256").update(data).digest("hex");
console.log(`stars.6.json   sha256 ${sha256(source)}`);
console.log(`catalogue.bin  sha256 ${sha256(bytes)}  ${bytes.length} bytes`);
console.log(`no B−V in the source, drawn white: ${withoutColour.map((hip) => `HIP ${hip}`).join(", ") || "none"}`);
