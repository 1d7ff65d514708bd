import type { RunInput } from '../results';
import { fieldSunHidden, type Field } from '../field';
import { SHADED_FROM } from '../run/day-shade';
import { SunSky } from '../run/sun-steps';
import { shortestDate, sunDay } from '../sun/day';
import { solarHour } from '../sun/position';
import type { ClearWindow } from './results';

const DAY_MS = 86400000;
const STEP_MS = 2 * 60000;
/** A step in which something changes is walked in so many parts: 7.5 s each. */
const PARTS = 16;

/** Spans without clear light of each tracker of a range, ms after noon of the sun: [from, to] behind one another. */
export interface WindowPart {
	/** First span of each tracker, and one more; in spans. */
	start: Int32Array;
	spans: Float64Array;
}

interface ShortDay {
	date: string;
	noonMs: number;
	sky: SunSky;
	dayOfYear: number;
}

function shortDay(input: RunInput): ShortDay {
	const date = shortestDate(input.place.latitudeDeg, input.year);
	const { transitMs } = sunDay(date, input.place, input.utcOffsetMinutes);
	const dayOfYear = Math.round((Date.parse(`${date}T00:00:00Z`) - Date.UTC(input.year, 0, 1)) / DAY_MS) + 1;
	return { date, noonMs: transitMs, sky: new SunSky(input.place), dayOfYear };
}

/**
 * When trackers `from` to `to` are without clear light on the shortest day: in the shade of anything (more than a
 * thousandth of the table), with the back to the sun, or with the sun below horizon or skyline. Ends to a few seconds.
 */
export function windowPart(field: Field, input: RunInput, range: { from: number; to: number }): WindowPart {
	const { engine } = field;
	const { from, to } = range;
	const n = to - from;
	const { noonMs, sky, dayOfYear } = shortDay(input);
	const shares = new Float64Array(engine.count);
	const dark = new Uint8Array(n).fill(1);
	const now = new Uint8Array(n);
	const openedMs = new Float64Array(n).fill(-DAY_MS / 2);
	/** Trackers that change within the step: only these are booked, so that ranges don't see more for their company. */
	const changes = new Uint8Array(n);
	const found: number[][] = Array.from({ length: n }, () => []);
	engine.setDay(dayOfYear);
	const look = (ms: number): void => {
		const sun = sky.at(noonMs + ms);
		if (sun.elevationDeg <= 0 || fieldSunHidden(field, sun)) {
			now.fill(1);
			return;
		}
		engine.setSun(sun.azimuthDeg, sun.elevationDeg);
		engine.shares(shares, from, to);
		for (let k = 0; k < n; k++) {
			now[k] = shares[from + k] > SHADED_FROM || engine.cosine(from + k) <= 0 ? 1 : 0;
		}
	};
	const book = (ms: number): void => {
		for (let k = 0; k < n; k++) {
			if (changes[k] === 0 || now[k] === dark[k]) continue;
			if (now[k] === 1) openedMs[k] = ms;
			else found[k].push(openedMs[k], ms);
			dark[k] = now[k];
		}
	};
	for (let ms = -DAY_MS / 2; ms <= DAY_MS / 2; ms += STEP_MS) {
		look(ms);
		let any = 0;
		for (let k = 0; k < n; k++) any |= changes[k] = now[k] === dark[k] ? 0 : 1;
		if (any === 0) continue;
		// Each change is booked at the middle of the part in which it comes.
		for (let part = 1; part <= PARTS; part++) {
			const at = ms - STEP_MS + (STEP_MS * part) / PARTS;
			look(at);
			book(at - STEP_MS / PARTS / 2);
		}
	}
	const start = new Int32Array(n + 1);
	for (let k = 0; k < n; k++) {
		if (dark[k] === 1) found[k].push(openedMs[k], DAY_MS / 2);
		start[k + 1] = start[k] + found[k].length / 2;
	}
	return { start, spans: Float64Array.from(found.flat()) };
}

/** The longest gap between spans that are sorted by their begin, ms after noon. */
function longestGap(spans: readonly (readonly [number, number])[]): [number, number] | null {
	let best: [number, number] | null = null;
	let covered = -DAY_MS / 2;
	for (const [open, close] of [...spans, [DAY_MS / 2, DAY_MS / 2] as const]) {
		if (open > covered && (best === null || open - covered > best[1] - best[0])) best = [covered, open];
		covered = Math.max(covered, close);
	}
	return best;
}

const spansOf = (part: WindowPart, at: number): [number, number][] =>
	Array.from({ length: part.start[at + 1] - part.start[at] }, (_, k) => {
		const o = 2 * (part.start[at] + k);
		return [part.spans[o], part.spans[o + 1]];
	});

/** The shade-free windows of the shortest day from the parts: of each tracker in order, and the one that all share. */
export function clearWindows(
	input: RunInput,
	parts: readonly WindowPart[]
): { date: string; field: ClearWindow | null; trackers: (ClearWindow | null)[] } {
	const { date, noonMs } = shortDay(input);
	const told = (gap: [number, number] | null): ClearWindow | null => {
		if (gap === null) return null;
		const fromMs = Math.round(noonMs + gap[0]);
		const toMs = Math.round(noonMs + gap[1]);
		const { longitudeDeg } = input.place;
		return {
			fromMs,
			toMs,
			fromSolarHour: solarHour(fromMs, longitudeDeg),
			toSolarHour: solarHour(toMs, longitudeDeg)
		};
	};
	const trackers: (ClearWindow | null)[] = [];
	const all: [number, number][] = [];
	for (const part of parts) {
		for (let at = 0; at + 1 < part.start.length; at++) {
			const spans = spansOf(part, at);
			for (const span of spans) all.push(span);
			trackers.push(told(longestGap(spans)));
		}
	}
	all.sort((a, b) => a[0] - b[0] || a[1] - b[1]);
	return { date, field: trackers.length > 0 ? told(longestGap(all)) : null, trackers };
}
