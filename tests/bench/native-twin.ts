import { writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { prepareField, type SunDirection } from '../../src/lib/core';
import type { Bench } from './bench';
import { alikeField } from './fields';
import { buildNative, runNative } from './native';
import { everySun } from './suns';

const SECTOR_DEG = 2.5;
const REPEATS = 5;
/** The two programs may differ by rounding alone. */
const SAME = 1e-9;

const sectorOf = (sun: SunDirection): number => Math.floor(sun.azimuthDeg / SECTOR_DEG);

/** The same alike shares by a plain C++ program with lists of neighbours by sector, and what the core does of that. */
export async function nativeFigures(bench: Bench): Promise<void> {
	const stem = 'native.alike.regular.1000';
	const program = await buildNative(bench, 'native/alike.cpp');
	if (program === null) return;
	const suns = [...everySun(bench.options.quick ? 11 : 1)].sort(
		(a, b) => sectorOf(a) - sectorOf(b) || b.elevationDeg - a.elevationDeg
	);
	const { engine } = prepareField(alikeField('regular', 1000));
	const { count, east, north, up } = engine;
	const { halfWidth, halfHeight, steelHalfWidth, steelHalfHeight } = engine.groups[0];
	const shares = new Float64Array(count);
	const out: number[] = [
		count,
		suns.length,
		halfWidth,
		halfHeight,
		steelHalfWidth,
		steelHalfHeight,
		SECTOR_DEG
	];
	for (let i = 0; i < count; i++) out.push(east[i], north[i], up[i]);
	let sum = 0;
	const pose = engine.poses[0];
	for (const sun of suns) {
		engine.setSun(sun.azimuthDeg, sun.elevationDeg);
		engine.shares(shares);
		for (const share of shares) sum += share;
		const { ux, uy, uz, vx, vy, vz, n } = pose;
		const sine = Math.sin((sun.elevationDeg * Math.PI) / 180);
		out.push(sectorOf(sun), sun.azimuthDeg, sine, ux, uy, uz, vx, vy, vz, n[0], n[1], n[2]);
	}
	const file = join(bench.options.folder, 'alike.bin');
	await writeFile(file, Float64Array.from(out));
	const answer = await runNative(program, [file, String(REPEATS)]);
	if (Math.abs(answer.sumOfShares - sum) > SAME * sum) {
		throw new Error(`The native twin sums shares to ${answer.sumOfShares}, the core to ${sum}.`);
	}
	const rate = (1000 * count * suns.length) / answer.processorMs;
	bench.note(`${stem}.tableSunsPerS`, rate, 'sums of all shares agree to 1e-9');
	const ours = bench.figures['alike.regular.1000.tableSunsPerS'];
	if (ours !== undefined) bench.note('alike.regular.1000.ofNative', ours / rate);
}
