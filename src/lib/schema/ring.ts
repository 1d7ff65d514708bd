import type { BoundaryPart, PlanPoint } from '../core/document';
import { ringProblems, ringProblemSentence, signedDoubleArea } from './plot-checks';

/** The same ring with the direction asked for. */
export function turnedRing(ring: PlanPoint[], counterClockwise: boolean): PlanPoint[] {
	return signedDoubleArea(ring) > 0 === counterClockwise ? ring : [...ring].reverse();
}

/** Boundary parts as documents keep them: outlines counter-clockwise, holes clockwise. */
export function turnedBoundary(parts: BoundaryPart[]): BoundaryPart[] {
	return parts.map((part) => ({
		outer: turnedRing(part.outer, true),
		holes: part.holes.map((hole) => turnedRing(hole, false))
	}));
}

/** Why an open ring cannot bound land, in a sentence with the remedy, or null when it can. Corners in metres. */
export function ringProblem(ring: PlanPoint[], of = 'The ring'): string | null {
	const [problem] = ringProblems(ring);
	return problem ? ringProblemSentence(problem, of) : null;
}
