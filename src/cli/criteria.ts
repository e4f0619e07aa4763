import always from "../../assets/criteria/always.json";
import comfort from "../../assets/criteria/comfort.json";
import droppedObjects from "../../assets/criteria/dropped-objects.json";
import type { CriterionRow } from "../criteria/row.ts";

/** The shipped rows. */
export const SHIPPED_ROWS = [...always, ...droppedObjects, ...comfort] as readonly CriterionRow[];
