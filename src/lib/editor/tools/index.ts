import { leastPitchM, reachRadiusM, rowPoints, type PlanPoint } from '$lib/core';
import type { Editor, ToolId } from '../editor.svelte';
import { alignPoint } from '../kernels/align';
import { leastAlongM } from '../kernels/fill-pitch';
import { nearestFoot } from '../kernels/pick';
import { LineTool } from './line-tool';
import { PlaceTool } from './place-tool';
import { SelectTool } from './select-tool';
import type { GroundPointer, Tool } from './tool';

export type { GroundPointer, Tool } from './tool';

/** Rows are kept to a size that a drag can't blow up by accident. */
const longestRow = 500;

/** Pitch of a row: the one typed, never so small that circles of the chosen model overlap; else the model's least. */
export function rowPitchM(editor: Editor): number {
	const { model, rowSpacing } = editor;
	if (!model) return rowSpacing.pitchM;
	if (rowSpacing.pitchM <= 0) return leastPitchM(model);
	return Math.max(rowSpacing.pitchM, leastAlongM(2 * reachRadiusM(model)));
}

/** Points of the row that the editor's settings give along a line. */
export function rowAlong(editor: Editor, from: PlanPoint, to: PlanPoint): PlanPoint[] {
	const { by, count } = editor.rowSpacing;
	if (!editor.model) return [];
	return rowPoints(from, to, by === 'pitch' ? { pitchM: rowPitchM(editor) } : { count }).slice(0, longestRow);
}

function rowTool(editor: Editor): Tool {
	const snap = (pointer: GroundPointer): PlanPoint => {
		if (pointer.free) return pointer.point;
		const aligned = alignPoint(pointer.point, editor.store.layout.trackers, pointer.toleranceM);
		editor.guides = aligned.guides;
		return aligned.point;
	};
	const clear = (): void => {
		editor.ghosts = [];
		editor.guides = [];
		editor.measured = null;
	};
	return new LineTool(
		snap,
		(from, to) => {
			editor.ghosts = to ? rowAlong(editor, from, to) : [from];
			editor.measured = to ? { from, to } : null;
		},
		(from, to) => {
			const points = rowAlong(editor, from, to);
			clear();
			// One row, one letter, however the row runs over the ground.
			const turnDeg = rowTurnDeg(from, to);
			editor.addPoints(`Place a row of ${points.length}`, points, { turnDeg });
		},
		clear
	);
}

/** Clockwise turn of a row against east-west, -90..90 degrees. */
export function rowTurnDeg(from: PlanPoint, to: PlanPoint): number {
	const turn = (-Math.atan2(to[1] - from[1], to[0] - from[0]) * 180) / Math.PI;
	if (turn > 90) return turn - 180;
	return turn <= -90 ? turn + 180 : turn;
}

function measureTool(editor: Editor): Tool {
	const snap = (pointer: GroundPointer): PlanPoint => {
		const { trackers } = editor.store.layout;
		const index = pointer.free ? -1 : nearestFoot(trackers, pointer.point, pointer.toleranceM * 2);
		return index < 0 ? pointer.point : [trackers[index].eastM, trackers[index].northM];
	};
	return new LineTool(
		snap,
		(from, to) => (editor.measured = { from, to: to ?? from }),
		(from, to) => (editor.measured = { from, to }),
		() => (editor.measured = null)
	);
}

/** The state machine of a tool; filling is done on a card and selects in the view. */
export function makeTool(id: ToolId, editor: Editor): Tool {
	if (editor.store.readOnly && id !== 'measure') return new SelectTool(editor);
	switch (id) {
		case 'place':
			return new PlaceTool(editor);
		case 'row':
			return rowTool(editor);
		case 'measure':
			return measureTool(editor);
		case 'select':
		case 'fill':
			return new SelectTool(editor);
	}
}
