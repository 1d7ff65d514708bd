import { difference } from 'polyclip-ts';
import type { Bench } from './bench';
import { coreTiming, Errors, LEAST_ASKED_COSINE, type posedScenes } from './posed';

type MultiPoly = ReturnType<typeof difference>;
type Ring = MultiPoly[number][number];

function ringArea(ring: Ring): number {
	let twice = 0;
	for (let k = 0; k + 1 < ring.length; k++) {
		twice += ring[k][0] * ring[k + 1][1] - ring[k + 1][0] * ring[k][1];
	}
	return Math.abs(twice) / 2;
}

/** Outer rings less their holes. */
const areaOf = (polygons: MultiPoly): number =>
	polygons.reduce(
		(sum, [outer, ...holes]) =>
			sum + ringArea(outer) - holes.reduce((taken, hole) => taken + ringArea(hole), 0),
		0
	);

interface Question {
	glass: MultiPoly;
	shadows: MultiPoly[];
	/** Ours. */
	share: number;
}

/** Every table that has shadows on it: its glass and each shadow as its own polygon. */
function questionsOf({ field, scenes }: ReturnType<typeof posedScenes>): Question[] {
	const { engine } = field;
	const questions: Question[] = [];
	for (const { sun, tables, shares } of scenes) {
		engine.setSun(sun.azimuthDeg, sun.elevationDeg);
		tables.forEach(({ halfWidth: w, halfHeight: h, halfGap, cosine }, i) => {
			if (cosine <= LEAST_ASKED_COSINE || engine.collect(i) === 0) return;
			const shadows: MultiPoly[] = [];
			engine.shadowsAhead(i, 0, (shadow, corners) => {
				const ring = Array.from({ length: corners }, (_, k): [number, number] => [
					shadow[2 * k],
					shadow[2 * k + 1]
				]);
				shadows.push([[[...ring, ring[0]]]]);
			});
			const pane = (x0: number, x1: number): [number, number][][] => [
				[
					[x0, -h],
					[x1, -h],
					[x1, h],
					[x0, h],
					[x0, -h]
				]
			];
			const glass = halfGap > 0 ? [pane(-w, -halfGap), pane(halfGap, w)] : [pane(-w, w)];
			if (shadows.length > 0) questions.push({ glass, shadows, share: shares[i] });
		});
	}
	return questions;
}

/**
 * A general polygon library on the same shadows: the glass less the union of all shadows, in one call. Who shades whom
 * and the projected shadows are given to it for nothing; it is asked only about tables with a shadow near.
 */
export function polygonUnion(bench: Bench, posed: ReturnType<typeof posedScenes>, place: string): void {
	const stem = `unionPolygons.${place}`;
	if (!bench.wants(stem)) return;
	const questions = questionsOf(posed);
	const lit = questions.map(() => 0);
	const run = (): void =>
		questions.forEach(({ glass, shadows }, q) => {
			lit[q] = areaOf(difference(glass, ...shadows));
		});
	const timing = bench.time(run, { warmMs: 0, repeats: 3, budgetMs: 4000 });
	const errors = new Errors();
	questions.forEach(({ glass, share }, q) => errors.add(share, 1 - lit[q] / areaOf(glass)));
	const tableSuns = posed.scenes.length * posed.field.engine.count;
	bench.note(
		`${stem}.tableSunsPerS`,
		(1000 * tableSuns) / timing.processorMs,
		`${questions.length} of ${tableSuns} tables had shadows near`
	);
	errors.note(bench, stem);
	bench.note(`${stem}.timesSlower`, timing.processorMs / coreTiming(bench, posed).processorMs);
}
