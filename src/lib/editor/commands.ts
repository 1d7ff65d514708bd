import { nextTags } from '$lib/core';
import { newTrackerId, type Editor, type ToolId, type ViewId } from './editor.svelte';
import { addTrackers, removeTrackers, retag, shiftTrackers } from './kernels/layout-edit';

/** One thing that can be done: the same record serves button and key. */
export interface Command {
	id: string;
	label: string;
	/** As `KeyboardEvent.key`, lower case; `mod+` stands for Ctrl or Cmd, `shift+` for Shift. */
	keys: string[];
	enabled: () => boolean;
	run: () => void;
}

const nudgeM = 0.1;
const wideNudgeM = 1;

const arrows: [key: string, word: string, east: number, north: number][] = [
	['arrowleft', 'west', -1, 0],
	['arrowright', 'east', 1, 0],
	['arrowup', 'north', 0, 1],
	['arrowdown', 'south', 0, -1]
];

export const toolNames: Record<ToolId, string> = {
	select: 'Select',
	place: 'Place',
	row: 'Row',
	fill: 'Fill',
	measure: 'Measure'
};

export const viewNames: Record<ViewId, string> = { space: '3D', plan: 'Plan', sun: 'Sun’s eye' };

const toolKeys: Record<ToolId, string> = { select: 'v', place: 'p', row: 'r', fill: 'f', measure: 'm' };

function toolCommands(editor: Editor): Command[] {
	return (Object.keys(toolNames) as ToolId[]).map((tool) => ({
		id: `tool.${tool}`,
		label: toolNames[tool],
		keys: [toolKeys[tool]],
		enabled: () => !editor.store.readOnly || tool === 'select' || tool === 'measure',
		run: () => editor.useTool(tool)
	}));
}

function nudgeCommands(editor: Editor): Command[] {
	const hasSelection = (): boolean => editor.selected.length > 0 && !editor.store.readOnly;
	return arrows.flatMap(([key, word, east, north]) =>
		[
			{ keys: [key], stepM: nudgeM },
			{ keys: [`shift+${key}`], stepM: wideNudgeM }
		].map(({ keys, stepM }): Command => ({
			id: `nudge.${word}.${stepM}`,
			label: `Move ${stepM} m ${word}`,
			keys,
			enabled: hasSelection,
			run: () => {
				const ids = new Set(editor.selected);
				const next = shiftTrackers(editor.store.layout, ids, east * stepM, north * stepM);
				editor.store.replaceLayout(moveLabel(editor), next, { mergeKey: `nudge ${[...ids].join(' ')}` });
			}
		}))
	);
}

function moveLabel(editor: Editor): string {
	const [first] = editor.selectedTrackers;
	return editor.selected.length === 1 && first
		? `Move ${first.tag}`
		: `Move ${editor.selected.length} trackers`;
}

export function removeSelected(editor: Editor): void {
	const trackers = editor.selectedTrackers;
	if (trackers.length === 0) return;
	const label = trackers.length === 1 ? `Delete ${trackers[0].tag}` : `Delete ${trackers.length} trackers`;
	editor.store.replaceLayout(label, removeTrackers(editor.store.layout, new Set(editor.selected)));
	editor.select([]);
	editor.said = `${label.replace('Delete', 'Deleted')}. Undo brings ${trackers.length === 1 ? 'it' : 'them'} back.`;
}

/** Copies of what is selected, set beside it to the east by its own width and a little. */
export function duplicateSelected(editor: Editor): void {
	const trackers = editor.selectedTrackers;
	if (trackers.length === 0) return;
	const easts = trackers.map(({ eastM }) => eastM);
	const first = editor.store.modelOf(trackers[0].modelId);
	const apartM = Math.max(...easts) - Math.min(...easts) + (first ? Math.ceil(first.widthM * 2) : 10);
	let next = editor.store.layout;
	const ids: string[] = [];
	const points = trackers.map(({ eastM, northM }): [number, number] => [eastM + apartM, northM]);
	const tags = nextTags(
		next.trackers.map(({ tag }) => tag),
		points
	);
	trackers.forEach((tracker, index) => {
		const model = editor.store.modelOf(tracker.modelId);
		if (!model) return;
		const id = newTrackerId();
		ids.push(id);
		const { axisHeightM, posture } = tracker;
		next = addTrackers(next, model, [{ id, tag: tags[index], point: points[index], axisHeightM, posture }]);
	});
	editor.store.replaceLayout(
		`Duplicate ${trackers.length === 1 ? trackers[0].tag : `${trackers.length} trackers`}`,
		next
	);
	editor.select(ids);
}

/** New tags for the whole layout: rows lettered from the north, numbered from the west. */
export function renumberAll(editor: Editor): void {
	const { layout } = editor.store;
	const tags = nextTags(
		[],
		layout.trackers.map(({ eastM, northM }): [number, number] => [eastM, northM])
	);
	editor.store.replaceLayout('Renumber all', retag(layout, tags));
	editor.said = 'All trackers have new tags.';
}

export function makeCommands(editor: Editor): Command[] {
	const { store } = editor;
	const editable = (): boolean => !store.readOnly;
	const chosen = (): boolean => editor.selected.length > 0;
	// What was said before no longer holds once history is walked.
	const travel = (word: string, label: string | null, go: () => void): void => {
		go();
		editor.said = label === null ? '' : `${word}: ${label}.`;
	};
	return [
		...toolCommands(editor),
		...nudgeCommands(editor),
		{
			id: 'undo',
			label: 'Undo',
			keys: ['mod+z'],
			enabled: () => store.canUndo,
			run: () => travel('Undone', store.undoLabel, () => store.undo())
		},
		{
			id: 'redo',
			label: 'Redo',
			keys: ['mod+shift+z', 'mod+y'],
			enabled: () => store.canRedo,
			run: () => travel('Redone', store.redoLabel, () => store.redo())
		},
		{
			id: 'select-all',
			label: 'Select all',
			keys: ['mod+a'],
			enabled: () => store.layout.trackers.length > 0,
			run: () => editor.select(store.layout.trackers.map(({ id }) => id))
		},
		{
			id: 'duplicate',
			label: 'Duplicate',
			keys: ['mod+d'],
			enabled: () => chosen() && editable(),
			run: () => duplicateSelected(editor)
		},
		{
			id: 'delete',
			label: 'Delete',
			keys: ['delete', 'backspace'],
			enabled: () => chosen() && editable(),
			run: () => removeSelected(editor)
		},
		{
			id: 'renumber',
			label: 'Renumber all',
			keys: [],
			enabled: () => editable() && store.layout.trackers.length > 0,
			run: () => renumberAll(editor)
		},
		{
			id: 'escape',
			label: 'Cancel',
			keys: ['escape'],
			enabled: () => true,
			run: () => {
				if (editor.cancelGesture()) return;
				if (editor.tool !== 'select') editor.useTool('select');
				else editor.select([]);
			}
		}
	];
}

/** The name of a key press as commands write it. */
export function keyName(event: Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'shiftKey'>): string {
	const mod = event.ctrlKey || event.metaKey ? 'mod+' : '';
	const shift = event.shiftKey ? 'shift+' : '';
	return mod + shift + event.key.toLowerCase();
}

/** Runs the command of a key press; answers whether there was one that could run. */
export function runKey(
	commands: readonly Command[],
	event: Pick<KeyboardEvent, 'key' | 'ctrlKey' | 'metaKey' | 'shiftKey'>
): boolean {
	const name = keyName(event);
	const command = commands.find(({ keys, enabled }) => keys.includes(name) && enabled());
	command?.run();
	return command !== undefined;
}
