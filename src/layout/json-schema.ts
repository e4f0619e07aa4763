import * as z from "zod/mini";
import { layoutSchema, VERSION } from "./schema.ts";

export const SCHEMA_ID = `urn:offplumb:layout:${VERSION}`;

/**
 * JSON Schema (2020-12) of the layout file, for editors that complete and check it. It says all that single fields can
 * break; what holds one part against another (ids, places on decks) only the parser says.
 */
export function layoutJsonSchema(): Record<string, unknown> {
	const { $schema, ...body } = z.toJSONSchema(layoutSchema, { target: "draft-2020-12", io: "input" });
	return {
		$schema,
		$id: SCHEMA_ID,
		title: `Layout file, version ${VERSION}`,
		description: "Spin, bays, elements, crew and activities of a spinning habitat. Every key ends in its unit where it has one.",
		...body,
	};
}
