import url from "../../assets/star/catalogue.bin?url";
import { say } from "../store/session.ts";
import { takeStars } from "../store/stars.ts";

/** Reads the shipped star catalogue; without it the sky stays dark, and the person is told. */
export async function loadStars(): Promise<void> {
	try {
		const answer = await fetch(url);
		if (!answer.ok) throw new Error(`${answer.status} ${answer.statusText}`);
		takeStars(new Uint8Array(await answer.arrayBuffer()));
	} catch (error) {
		say(
			`The star catalogue could not be read (${error instanceof Error ? error.message : String(error)}); the sky outside is drawn without stars.`,
		);
	}
}
