import { writeFileSync } from "node:fs";
import { PNG } from "pngjs";

/** Writes a picture as PNG, to be looked at. */
export function writePng(
	path: string,
	picture: { readonly width: number; readonly height: number; readonly pixels: Uint8ClampedArray },
): void {
	const png = new PNG({ width: picture.width, height: picture.height });
	png.data = Buffer.from(picture.pixels.buffer, picture.pixels.byteOffset, picture.pixels.byteLength);
	writeFileSync(path, PNG.sync.write(png));
}
