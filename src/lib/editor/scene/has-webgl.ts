/** Whether this browser can draw the 3D view at all. */
export function hasWebgl(): boolean {
	const context = document.createElement('canvas').getContext('webgl2');
	if (!context) return false;
	// Browsers keep only a few contexts alive: the one for asking is given back at once.
	context.getExtension('WEBGL_lose_context')?.loseContext();
	return true;
}
