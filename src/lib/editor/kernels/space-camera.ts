import type { Vec3 } from '$lib/core';

/**
 * A look at the field in space: from a distance with perspective, or along parallel lines (for the look from the sun).
 * East, north, up in metres; screen pixels from the upper left.
 */
export interface SpaceCamera {
	target: Vec3;
	/** Bearing that the camera looks towards; 0 looks north. */
	headingDeg: number;
	/** How far the camera looks down from the level, degrees. */
	pitchDeg: number;
	/** From eye to target, metres; for a parallel look it sets how much is seen. */
	distanceM: number;
	parallel: boolean;
	widthPx: number;
	heightPx: number;
}

export const fieldOfViewDeg = 28;
const halfTangent = Math.tan((fieldOfViewDeg / 2) * (Math.PI / 180));
export const leastPitchDeg = 4;
export const mostPitchDeg = 89.9;

export interface CameraFrame {
	eye: Vec3;
	forward: Vec3;
	right: Vec3;
	up: Vec3;
}

function plus(a: Vec3, b: Vec3, times: number): Vec3 {
	return [a[0] + b[0] * times, a[1] + b[1] * times, a[2] + b[2] * times];
}

function dot(a: Vec3, b: Vec3): number {
	return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

export function cameraFrame(camera: SpaceCamera): CameraFrame {
	const heading = (camera.headingDeg * Math.PI) / 180;
	const pitch = (camera.pitchDeg * Math.PI) / 180;
	const forward: Vec3 = [
		Math.sin(heading) * Math.cos(pitch),
		Math.cos(heading) * Math.cos(pitch),
		-Math.sin(pitch)
	];
	const right: Vec3 = [Math.cos(heading), -Math.sin(heading), 0];
	const up: Vec3 = [
		Math.sin(heading) * Math.sin(pitch),
		Math.cos(heading) * Math.sin(pitch),
		Math.cos(pitch)
	];
	return { eye: plus(camera.target, forward, -camera.distanceM), forward, right, up };
}

/** Metres that half the picture's height spans at the target. */
export function halfHeightM(camera: SpaceCamera): number {
	return camera.distanceM * halfTangent;
}

/** Metres of one pixel at the target. */
export function metresPerPx(camera: SpaceCamera): number {
	return (2 * halfHeightM(camera)) / Math.max(1, camera.heightPx);
}

export function rayAt(camera: SpaceCamera, x: number, y: number): { origin: Vec3; direction: Vec3 } {
	const { eye, forward, right, up } = cameraFrame(camera);
	const across = (x - camera.widthPx / 2) * metresPerPx(camera);
	const above = (camera.heightPx / 2 - y) * metresPerPx(camera);
	if (camera.parallel) return { origin: plus(plus(eye, right, across), up, above), direction: forward };
	const through = plus(plus(camera.target, right, across), up, above);
	return { origin: eye, direction: plus(through, eye, -1) };
}

/** Screen place of a point; null when it is behind the eye. */
export function project(camera: SpaceCamera, point: Vec3): [x: number, y: number] | null {
	return projectFrom(camera, cameraFrame(camera), point);
}

/** As `project`, with the frame worked out once for many points. */
export function projectFrom(
	camera: SpaceCamera,
	frame: CameraFrame,
	point: Vec3
): [x: number, y: number] | null {
	const from = plus(point, frame.eye, -1);
	const depth = dot(from, frame.forward);
	if (!camera.parallel && depth <= 0.01) return null;
	const scale = camera.parallel ? 1 / metresPerPx(camera) : camera.distanceM / depth / metresPerPx(camera);
	return [
		camera.widthPx / 2 + dot(from, frame.right) * scale,
		camera.heightPx / 2 - dot(from, frame.up) * scale
	];
}

/** As `fitPoints`, with room kept free on the left and on the right for what lies over the picture, pixels. */
export function fitBeside(
	camera: SpaceCamera,
	points: readonly Vec3[],
	margin: number,
	room: { leftPx: number; rightPx: number }
): SpaceCamera {
	const freePx = Math.max(40, camera.widthPx - room.leftPx - room.rightPx);
	const narrow = fitPoints({ ...camera, widthPx: freePx }, points, margin);
	const shiftM = ((room.rightPx - room.leftPx) / 2) * metresPerPx(narrow);
	return {
		...narrow,
		widthPx: camera.widthPx,
		target: plus(narrow.target, cameraFrame(narrow).right, shiftM)
	};
}

export function turnBy(camera: SpaceCamera, dx: number, dy: number): SpaceCamera {
	return {
		...camera,
		headingDeg: (camera.headingDeg + dx * 0.3 + 360) % 360,
		pitchDeg: Math.min(mostPitchDeg, Math.max(leastPitchDeg, camera.pitchDeg + dy * 0.25))
	};
}

/** Shifts the target over the ground, so that what is held follows the pointer. */
export function slideBy(camera: SpaceCamera, dx: number, dy: number): SpaceCamera {
	const { right, up } = cameraFrame(camera);
	const perPx = metresPerPx(camera);
	const level = Math.max(0.25, Math.hypot(up[0], up[1]));
	const ahead: Vec3 = [up[0] / level ** 2, up[1] / level ** 2, 0];
	return { ...camera, target: plus(plus(camera.target, right, -dx * perPx), ahead, dy * perPx) };
}

export function zoomBy(camera: SpaceCamera, factor: number): SpaceCamera {
	return { ...camera, distanceM: Math.min(20_000, Math.max(4, camera.distanceM / factor)) };
}

/** Looks at points from the camera's direction so that all of them are in the picture, with a free margin of its size. */
export function fitPoints(camera: SpaceCamera, points: readonly Vec3[], margin = 0.16): SpaceCamera {
	if (points.length === 0) return camera;
	const { right, up, forward } = cameraFrame(camera);
	const span = (axis: Vec3): [number, number] => {
		const values = points.map((point) => dot(point, axis));
		return [
			values.reduce((a, b) => Math.min(a, b), Infinity),
			values.reduce((a, b) => Math.max(a, b), -Infinity)
		];
	};
	const [r, u, f] = [span(right), span(up), span(forward)];
	const middle = (range: [number, number]): number => (range[0] + range[1]) / 2;
	let target: Vec3 = [0, 0, 0];
	target = plus(target, right, middle(r));
	target = plus(target, up, middle(u));
	target = plus(target, forward, middle(f));
	const aspect = camera.widthPx / Math.max(1, camera.heightPx);
	const half = Math.max((u[1] - u[0]) / 2, (r[1] - r[0]) / 2 / aspect, 3) * (1 + 2 * margin);
	const nearer = camera.parallel ? 0 : (f[1] - f[0]) / 4;
	return { ...camera, target, distanceM: half / halfTangent + nearer };
}
