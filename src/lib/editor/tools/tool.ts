import type { PlanPoint } from '$lib/core';

/** What a view tells a tool about the pointer, in the terms of the ground. */
export interface GroundPointer {
	/** Where the pointer meets the ground. */
	point: PlanPoint;
	/** The tracker under it. */
	hitId: string | null;
	/** Shift: add to the selection, or draw a box on empty ground. */
	shift: boolean;
	/** Alt: no falling into line. */
	free: boolean;
	/** A few pixels, in metres at this zoom. */
	toleranceM: number;
}

/** A small state machine between pointer and layout; views feed it, it never knows which view. */
export interface Tool {
	/** Answers true when the tool takes the pointer; else the view pans or turns with it. */
	press(pointer: GroundPointer): boolean;
	/** Moved with the button down, after `press` took it. */
	drag(pointer: GroundPointer): void;
	/** The button went up, after `press` took it. */
	release(pointer: GroundPointer): void;
	/** Pressed and released on the same spot, when `press` did not take it. */
	tap(pointer: GroundPointer): void;
	/** Moved with no button down. */
	hover(pointer: GroundPointer): void;
	/** Gives up what is under way; answers whether anything was. */
	cancel(): boolean;
}

/** How far a pointer may wander and still be a click. */
export function hasMoved(from: PlanPoint, to: PlanPoint, toleranceM: number): boolean {
	return Math.hypot(to[0] - from[0], to[1] - from[1]) > toleranceM;
}
