import type { World } from "../flight/world.ts";
import type { Spin } from "../frame/spin.ts";
import type { Habitat } from "../layout/habitat.ts";
import type { CanalConstants } from "../vestibular/constants.ts";

/** What every activity is computed in: one habitat, one spin, one person. SI. */
export interface Context {
	readonly habitat: Habitat;
	readonly world: World;
	/** Its time 0 is the activity's. */
	readonly spin: Spin;
	/** Id of the phase. */
	readonly phase: string;
	readonly person: Person;
	readonly canals: CanalConstants;
}

export interface Person {
	readonly id: string;
	/** m */
	readonly stature: number;
	/** kg */
	readonly mass: number;
}
