import { gzipSync } from 'node:zlib';
import {
	energyYear,
	fieldLoss,
	irradiance,
	mountScene,
	mountYear,
	shadeScene,
	shadeYear,
	sunPosition
} from '../../core';
import type { RunInput, ShadeResult } from '../../core/results';
import { roundedJson } from './rounded-json';
import type { PackedResult, WorkerCall } from './tasks';

/** Part of a run with energy that its shade is, for telling the progress. */
const SHADE_01 = 0.25;

/** Fewest milliseconds between two messages about progress. */
const PROGRESS_EVERY_MS = 100;

/** What a worker thread runs. Bundled to one module; imports only the core. */
export default function work(call: WorkerCall): unknown {
	const { task } = call;
	switch (task.kind) {
		case 'shade-run':
			return packed(call, (onProgress) => shadeRun(task.input, onProgress));
		case 'mount-run':
			return packed(call, (onProgress) => mountYear(task.input, undefined, onProgress));
		case 'sun': {
			const { latitudeDeg, longitudeDeg, times } = task.request;
			return times.map((time) => ({
				time,
				...sunPosition(Date.parse(time), latitudeDeg, longitudeDeg)
			}));
		}
		case 'irradiance':
			return irradiance(task.request);
		case 'shade-scene':
			return shadeScene(task.scene);
		case 'mount-scene':
			return mountScene(task.scene);
		case 'field-loss':
			return fieldLoss(task.request);
	}
}

/** The shade of a year and, when it was asked for, its energy. */
function shadeRun(input: RunInput, onProgress: (done01: number) => boolean): ShadeResult | null {
	const energyAsked = input.energy !== undefined;
	const shade = shadeYear(input, (done01) => onProgress(energyAsked ? done01 * SHADE_01 : done01));
	if (!shade || !energyAsked) return shade;
	const energy = energyYear(input, (done01) => onProgress(SHADE_01 + (1 - SHADE_01) * done01));
	return energy && { ...shade, energy };
}

/** Runs a year, tells how far it is, and packs the result; null when it was stopped. */
function packed(
	call: WorkerCall,
	compute: (onProgress: (done01: number) => boolean) => unknown
): PackedResult | null {
	const stop = call.stop ? new Int32Array(call.stop) : null;
	const begun = performance.now();
	let toldAt = begun;
	const result = compute((done01) => {
		const now = performance.now();
		if (now - toldAt >= PROGRESS_EVERY_MS) {
			toldAt = now;
			call.port?.postMessage({ done01 });
		}
		return stop === null || Atomics.load(stop, 0) === 0;
	});
	if (result === null) return null;
	const computeMs = performance.now() - begun;
	const text = Buffer.from(roundedJson(result));
	return { gzip: gzipSync(text, { level: 4 }), jsonBytes: text.byteLength, computeMs };
}
