import type { Layout, Place, WinterRule } from '../document';
import type { DayShade, WinterVerdict } from '../results';
import { solarHour } from '../sun/position';
import { SHADED_FROM } from './day-shade';

/** Elevations nearer than this to the rule's are equal to it, degrees: the accuracy of the sun. */
const SLACK_DEG = 0.01;

/**
 * Whether a layout keeps its winter rule on a day's shade, and who breaks it. A tracker counts as shaded when more
 * than a thousandth of its table is; minutes are those of the steps that break the rule. A sun behind the skyline or
 * behind the table breaks nothing; a day on which the sun never stands where the rule looks keeps it with 0 judged
 * minutes, which says nothing about the layout. Worst first: by minutes, then by the height up to which it is shaded, then as
 * in the layout.
 */
export function winterVerdict(
	day: DayShade,
	layout: Layout,
	place: Pick<Place, 'longitudeDeg'>,
	rule: WinterRule
): WinterVerdict {
	const n = day.timesMs.length;
	const stepMinutes = n > 1 ? (day.timesMs[1] - day.timesMs[0]) / 60000 : 0;
	const counted = day.timesMs.map((timeMs, k) => {
		if (day.sunHidden[k]) return false;
		if (rule.kind === 'clear-above') return day.sunElevationDeg[k] > rule.elevationDeg;
		const hour = solarHour(timeMs, place.longitudeDeg);
		return hour >= rule.fromSolarHour && hour <= rule.toSolarHour;
	});
	const back = new Set(day.backToSun.map(([i, k]) => i * n + k));
	const brokenBy: WinterVerdict['brokenBy'] = [];
	let clearAboveDeg: number | null = null;
	layout.trackers.forEach((tracker, i) => {
		const upTo = day.shadedUpToDeg[i] ?? null;
		if (upTo !== null && (clearAboveDeg === null || upTo > clearAboveDeg)) clearAboveDeg = upTo;
		let steps = 0;
		for (let k = 0; k < n; k++) {
			if (counted[k] && day.shares[i][k] > SHADED_FROM && !back.has(i * n + k)) steps++;
		}
		// Between the steps the refined height decides.
		const broken =
			rule.kind === 'clear-above' ? upTo !== null && upTo > rule.elevationDeg + SLACK_DEG : steps > 0;
		if (!broken) return;
		brokenBy.push({
			trackerId: tracker.id,
			tag: tracker.tag,
			shadedUpToDeg: upTo ?? 0,
			minutes: steps * stepMinutes
		});
	});
	brokenBy.sort((a, b) => b.minutes - a.minutes || b.shadedUpToDeg - a.shadedUpToDeg);
	const judgedMinutes = counted.filter(Boolean).length * stepMinutes;
	return { rule, date: day.date, met: brokenBy.length === 0, brokenBy, clearAboveDeg, judgedMinutes };
}
