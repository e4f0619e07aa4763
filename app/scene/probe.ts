/** Whether this browser gives WebGL, and whether a processor draws it. */
export function probeWebGl(): "none" | "software" | "hardware" {
	const gl = document.createElement("canvas").getContext("webgl2", { failIfMajorPerformanceCaveat: false });
	if (!gl) return "none";
	const info = gl.getExtension("WEBGL_debug_renderer_info");
	const name = String(info ? gl.getParameter(info.UNMASKED_RENDERER_WEBGL) : gl.getParameter(gl.RENDERER));
	gl.getExtension("WEBGL_lose_context")?.loseContext();
	return /swiftshader|llvmpipe|software|basic render/i.test(name) ? "software" : "hardware";
}
