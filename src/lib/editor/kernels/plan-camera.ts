import type { PlanPoint } from '$lib/core';
import type { PlanBox } from './pick';

/** A north-up look at the ground from above. */
export interface PlanCamera {
	/** Ground point in the middle of the picture. */
	eastM: number;
	northM: number;
	pxPerM: number;
	widthPx: number;
	heightPx: number;
}

const leastPxPerM = 0.05;
const mostPxPerM = 400;

function heldScale(pxPerM: number): number {
	return Math.min(mostPxPerM, Math.max(leastPxPerM, pxPerM));
}

export function toScreen(camera: PlanCamera, point: PlanPoint): [x: number, y: number] {
	return [
		camera.widthPx / 2 + (point[0] - camera.eastM) * camera.pxPerM,
		camera.heightPx / 2 - (point[1] - camera.northM) * camera.pxPerM
	];
}

export function toGround(camera: PlanCamera, x: number, y: number): PlanPoint {
	return [
		camera.eastM + (x - camera.widthPx / 2) / camera.pxPerM,
		camera.northM - (y - camera.heightPx / 2) / camera.pxPerM
	];
}

/** Zooms by a factor and keeps the ground point under the pointer where it is. */
export function zoomAt(camera: PlanCamera, x: number, y: number, factor: number): PlanCamera {
	const [eastM, northM] = toGround(camera, x, y);
	const pxPerM = heldScale(camera.pxPerM * factor);
	return {
		...camera,
		pxPerM,
		eastM: eastM - (x - camera.widthPx / 2) / pxPerM,
		northM: northM + (y - camera.heightPx / 2) / pxPerM
	};
}

export function panBy(camera: PlanCamera, dx: number, dy: number): PlanCamera {
	return {
		...camera,
		eastM: camera.eastM - dx / camera.pxPerM,
		northM: camera.northM + dy / camera.pxPerM
	};
}

/** Room kept free around what is shown, pixels: for the tools, the numbers and the inspector. */
export interface Margins {
	left: number;
	right: number;
	top: number;
	bottom: number;
}

/** Shows the whole box inside the margins. */
export function fitBox(camera: PlanCamera, box: PlanBox, margins: Margins): PlanCamera {
	const widthPx = Math.max(40, camera.widthPx - margins.left - margins.right);
	const heightPx = Math.max(40, camera.heightPx - margins.top - margins.bottom);
	const widthM = Math.max(1, box.eastM - box.westM);
	const heightM = Math.max(1, box.northM - box.southM);
	const pxPerM = heldScale(Math.min(widthPx / widthM, heightPx / heightM));
	return {
		...camera,
		pxPerM,
		eastM: (box.westM + box.eastM) / 2 + (margins.right - margins.left) / 2 / pxPerM,
		northM: (box.southM + box.northM) / 2 - (margins.bottom - margins.top) / 2 / pxPerM
	};
}

/** A scale at which tables and tags are read with ease, pixels per metre. */
const readablePxPerM = 12;
/** Ground that is seen around what is framed: its circles and what stands next to them, metres. */
const aroundM = 8;

/**
 * Brings a few things into the picture, inside the margins, at a scale that can be read: nearer when that is possible, further off
 * only as far as it takes to see all of them.
 */
export function frameBox(camera: PlanCamera, box: PlanBox, margins: Margins): PlanCamera {
	const around = {
		westM: box.westM - aroundM,
		eastM: box.eastM + aroundM,
		southM: box.southM - aroundM,
		northM: box.northM + aroundM
	};
	const fit = fitBox(camera, around, margins);
	const pxPerM = Math.min(fit.pxPerM, Math.max(camera.pxPerM, readablePxPerM));
	return {
		...fit,
		pxPerM,
		eastM: (box.westM + box.eastM) / 2 + (margins.right - margins.left) / 2 / pxPerM,
		northM: (box.southM + box.northM) / 2 - (margins.bottom - margins.top) / 2 / pxPerM
	};
}
