import type { DayShade, Layout, Place, Plot, WinterRule, WinterVerdict } from '$lib/core';

/** What the preview worker is asked for: the chosen day, and the shortest day with the winter rule. */
export interface PreviewRequest {
	id: number;
	place: Place;
	plot: Plot;
	layout: Layout;
	winterRule: WinterRule;
	date: string;
	shortestDate: string;
	stepMinutes: number;
	utcOffsetMinutes: number;
}

export interface PreviewAnswer {
	id: number;
	day: DayShade;
	shortestDay: DayShade;
	verdict: WinterVerdict;
	/** Time that the computation took in the worker, milliseconds. */
	computeMs: number;
}
