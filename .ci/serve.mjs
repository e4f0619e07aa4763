// @ts-check
// A static server for one folder on the loopback address.
import { createReadStream } from "node:fs";
import { realpath, stat } from "node:fs/promises";
import { createServer } from "node:http";
import { extname, join, sep } from "node:path";

const HOST = "127.0.0.1";
/** @type {Record<string, string>} */
const types = {
	".html": "text/html; charset=utf-8",
	".js": "text/javascript; charset=utf-8",
	".mjs": "text/javascript; charset=utf-8",
	".css": "text/css; charset=utf-8",
	".json": "application/json; charset=utf-8",
	".map": "application/json; charset=utf-8",
	".svg": "image/svg+xml",
	".png": "image/png",
	".jpg": "image/jpeg",
	".ico": "image/x-icon",
	".woff2": "font/woff2",
	".woff": "font/woff",
	".wasm": "application/wasm",
	".glb": "model/gltf-binary",
	".bin": "application/octet-stream",
	".csv": "text/csv; charset=utf-8",
	".md": "text/markdown; charset=utf-8",
	".txt": "text/plain; charset=utf-8",
};

const headers = {
	"Content-Security-Policy": [
		"default-src 'none'",
		"script-src 'self'",
		"style-src 'self'",
		"img-src 'self' data: blob:",
		"font-src 'self'",
		"connect-src 'self'",
		"worker-src 'self' blob:",
		"manifest-src 'self'",
		"base-uri 'none'",
		"form-action 'none'",
		"frame-ancestors 'none'",
	].join("; "),
	"Cross-Origin-Opener-Policy": "same-origin",
	"Cross-Origin-Resource-Policy": "same-origin",
	"Referrer-Policy": "no-referrer",
	"X-Content-Type-Options": "nosniff",
};

/** The file that a request path names, or null where it names none inside the folder. @param {string} folder @param {string} url */
async function find(folder, url) {
	try {
		const path = decodeURIComponent(url.split(/[?#]/, 1)[0] ?? "");
		if (path.includes("\0") || path.includes("\\") || path.split("/").some((part) => part.startsWith("."))) return null;
		const inside = await realpath(folder);
		const file = await realpath(join(inside, path.endsWith("/") ? `${path}index.html` : path));
		if (!file.startsWith(inside + sep)) return null;
		const facts = await stat(file);
		return facts.isFile() ? { file, facts } : null;
	} catch {
		return null;
	}
}

/**
 * Serves `folder` and resolves when it listens. Names other than loopback are refused, so that no foreign page reaches it by renaming itself.
 * @param {string} folder @param {number} [port] 0 picks a free one
 * @returns {Promise<{ url: string, port: number, close: () => Promise<void> }>} rejects with code EADDRINUSE where the port is taken
 */
export function serve(folder, port = 0) {
	const server = createServer(async (request, response) => {
		const end = (/** @type {number} */ status, /** @type {string} */ text, extra = {}) => {
			response.writeHead(status, { ...headers, "Content-Type": "text/plain; charset=utf-8", "Cache-Control": "no-store", ...extra });
			response.end(request.method === "HEAD" ? undefined : `${text}\n`);
		};
		if (!/^(127\.0\.0\.1|localhost)(:\d+)?$/.test(request.headers.host ?? "")) return end(421, "This server answers to 127.0.0.1 only.");
		if (request.method !== "GET" && request.method !== "HEAD") return end(405, "GET and HEAD only.", { Allow: "GET, HEAD" });
		const found = await find(folder, request.url ?? "/");
		if (found === null) return end(404, "Not found.");
		const { file, facts } = found;
		const etag = `"${facts.size.toString(36)}-${Math.round(facts.mtimeMs).toString(36)}"`;
		// The bundler puts a hash of the content into the names below assets/.
		const caching = /[\\/]assets[\\/][^\\/]+-[\w-]{8}\.\w+$/.test(file) ? "public, max-age=31536000, immutable" : "no-cache";
		const common = { ...headers, "Cache-Control": caching, ETag: etag };
		if (request.headers["if-none-match"] === etag) {
			response.writeHead(304, common).end();
			return;
		}
		const type = types[extname(file).toLowerCase()] ?? "application/octet-stream";
		response.writeHead(200, { ...common, "Content-Type": type, "Content-Length": facts.size });
		if (request.method === "HEAD") response.end();
		else
			createReadStream(file)
				.on("error", () => response.destroy())
				.pipe(response);
	});
	return new Promise((resolve, reject) => {
		server.once("error", reject);
		server.listen({ host: HOST, port, exclusive: true }, () => {
			const address = server.address();
			if (address === null || typeof address === "string") throw new Error(`listening at ${address}, not at an address with a port`);
			const close = () =>
				new Promise((/** @type {(value: void) => void} */ closed) => {
					server.close(() => closed());
					server.closeAllConnections();
				});
			resolve({ url: `http://${HOST}:${address.port}/`, port: address.port, close });
		});
	});
}
