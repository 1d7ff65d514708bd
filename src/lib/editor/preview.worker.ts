/** Computes day shade beside the page, so that editing never waits for it. */
import { dayShade, prepareField, winterVerdict } from '$lib/core';
import type { PreviewAnswer, PreviewRequest } from './preview-message';

self.onmessage = (event: MessageEvent<PreviewRequest>) => {
	const { id, place, plot, layout, winterRule, date, shortestDate, stepMinutes, utcOffsetMinutes } =
		event.data;
	const start = performance.now();
	const field = prepareField({ place, plot, layout });
	const shortestDay = dayShade(field, shortestDate, stepMinutes, utcOffsetMinutes);
	const day = date === shortestDate ? shortestDay : dayShade(field, date, stepMinutes, utcOffsetMinutes);
	const verdict = winterVerdict(shortestDay, layout, place, winterRule);
	const answer: PreviewAnswer = { id, day, shortestDay, verdict, computeMs: performance.now() - start };
	self.postMessage(answer);
};
