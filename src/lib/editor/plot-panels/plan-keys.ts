import type { Margins } from '../kernels/plan-camera';
import type { PlotDesk } from './plot-desk.svelte';

const PAN_PX = 60;
const arrows: Record<string, [east: number, north: number]> = {
	ArrowLeft: [-1, 0],
	ArrowRight: [1, 0],
	ArrowUp: [0, 1],
	ArrowDown: [0, -1]
};

/** Keys on the plan: drawing first, then what is selected, then the view. Marks a key that was used as handled. */
export function planKey(desk: PlotDesk, event: KeyboardEvent, margins: Margins): void {
	if (event.ctrlKey || event.metaKey || event.altKey) return;
	if (act(desk, event, margins)) event.preventDefault();
}

function act(desk: PlotDesk, event: KeyboardEvent, margins: Margins): boolean {
	if (desk.drawing && drawingKey(desk, event.key)) return true;
	const arrow = arrows[event.key];
	if (arrow) {
		const [east, north] = arrow;
		if (!desk.readOnly && (desk.corner || desk.obstacleId)) {
			const stepM = event.shiftKey ? 1 : 0.1;
			desk.nudge(east * stepM, north * stepM);
		} else desk.pan(-east * PAN_PX, north * PAN_PX);
		return true;
	}
	switch (event.key) {
		case '+':
		case '=':
			desk.zoom(1.25);
			return true;
		case '-':
			desk.zoom(0.8);
			return true;
		case '0':
			desk.fit(margins);
			return true;
		case 'Escape':
			if (desk.tool === 'select') desk.clearSelection();
			else desk.choose('select');
			return true;
		case 'Delete':
		case 'Backspace':
			if (desk.readOnly || (!desk.corner && !desk.obstacleId)) return false;
			desk.removeSelected();
			return true;
		default:
			return false;
	}
}

function drawingKey(desk: PlotDesk, key: string): boolean {
	if (key === 'Enter') desk.closeDraft();
	else if (key === 'Escape') desk.cancelDraft();
	else if (key === 'Backspace' || key === 'Delete') desk.dropDraftCorner();
	else return false;
	return true;
}
