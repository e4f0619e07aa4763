import { Refusal } from "./call.ts";

/** Writes to standard output. A reader that has gone away (`| head -1`) is no fault; whatever else fails is told. */
export function print(text: string): Promise<void> {
	return new Promise((resolve, reject) => {
		process.stdout.write(text, (error) => {
			if (!error || ("code" in error && error.code === "EPIPE")) resolve();
			else reject(new Refusal(`standard output cannot be written: ${error.message}`));
		});
	});
}
