import { fieldLitPieces, sunVector, tableAxes, trackerPoses, type Field } from '$lib/core';
import type { Camera } from './camera';

type Vec = [number, number, number];

export interface DrawnTracker {
	tag: string;
	depthM: number;
	post: string;
	table: string;
	/** Seen from the glass side. */
	front: boolean;
	lit: string[];
	/** Lines between modules. */
	joints: string;
}

export interface DrawnField {
	shadows: string[];
	trackers: DrawnTracker[];
	/** The sun's disc, when the eye looks its way. */
	sun: { x: number; y: number } | null;
}

/** A shadow longer than this is cut: at sunrise it would reach the horizon. */
const LONGEST_M = 90;

function path(camera: Camera, points: Vec[], closed = true): string | null {
	const seen = points.map((point) => camera.see(point));
	if (seen.some((point) => point === null)) return null;
	const text = seen.map(
		(point, index) => `${index ? 'L' : 'M'}${point?.x.toFixed(1)} ${point?.y.toFixed(1)}`
	);
	return text.join('') + (closed ? 'Z' : '');
}

/** The field as it stands at a sun, drawn from the same poses and lit pieces that every page computes with. */
export function drawField(
	field: Field,
	feet: readonly { tag: string; eastM: number; northM: number }[],
	camera: Camera,
	sun: { azimuthDeg: number; elevationDeg: number }
): DrawnField {
	const day = sun.elevationDeg > 0;
	const poses = trackerPoses(field, sun);
	const pieces = day ? fieldLitPieces(field, sun) : [];
	const light = sunVector(sun.azimuthDeg, sun.elevationDeg);
	const shadows: string[] = [];
	const trackers: DrawnTracker[] = [];
	poses.forEach((pose, index) => {
		const { u, v, n } = tableAxes(pose.azimuthDeg, pose.tiltDeg);
		const at = (x: number, y: number): Vec => [
			pose.centre[0] + u[0] * x + v[0] * y,
			pose.centre[1] + u[1] * x + v[1] * y,
			pose.centre[2] + u[2] * x + v[2] * y
		];
		const [w, h] = [pose.widthM / 2, pose.heightM / 2];
		const corners = [at(-w, -h), at(w, -h), at(w, h), at(-w, h)];
		const table = path(camera, corners);
		const foot: Vec = [feet[index].eastM, feet[index].northM, 0];
		const post = path(camera, [foot, [foot[0], foot[1], pose.centre[2]]], false);
		const middle = camera.see(pose.centre);
		if (!table || !post || !middle) return;
		if (day) {
			const grounded = corners.map((corner): Vec => {
				const reach = Math.min(corner[2] / light[2], LONGEST_M);
				return [corner[0] - light[0] * reach, corner[1] - light[1] * reach, 0];
			});
			const shadow = path(camera, grounded);
			const thin = Math.min(pose.centre[2] / light[2], LONGEST_M);
			const end: Vec = [foot[0] - light[0] * thin, foot[1] - light[1] * thin, 0];
			const stripe = path(camera, [[foot[0] - 0.1, foot[1], 0], end, [foot[0] + 0.1, foot[1], 0]]);
			shadows.push(...[shadow, stripe].filter((each) => each !== null));
		}
		const joints = [-1 / 6, 1 / 6].map((part) =>
			path(camera, [at(pose.widthM * part, -h), at(pose.widthM * part, h)], false)
		);
		const eyeSide = camera.see([
			pose.centre[0] + n[0] * 0.1,
			pose.centre[1] + n[1] * 0.1,
			pose.centre[2] + n[2] * 0.1
		]);
		trackers.push({
			tag: feet[index].tag,
			depthM: middle.depthM,
			post,
			table,
			front: eyeSide !== null && eyeSide.depthM < middle.depthM,
			lit: (pieces[index] ?? []).flatMap((flat) => {
				const ring = Array.from({ length: flat.length / 2 }, (_, k) => at(flat[2 * k], flat[2 * k + 1]));
				return path(camera, ring) ?? [];
			}),
			joints: joints.filter((each) => each !== null).join('')
		});
	});
	trackers.sort((a, b) => b.depthM - a.depthM);
	const disc = camera.see([light[0] * 5000, light[1] * 5000, light[2] * 5000]);
	return { shadows, trackers, sun: day ? disc && { x: disc.x, y: disc.y } : null };
}
