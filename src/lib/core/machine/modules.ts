import type { TrackerModel } from '../document';

/** Cell groups with a bypass in a common module: common practice, no source. */
export const COMMON_GROUPS_PER_MODULE = 3;

/** How the modules of a table are laid and wired, with what the model leaves out filled in. */
export interface ModuleGrid {
	columns: number;
	rows: number;
	/** 'portrait' has the long side up the slope, 'landscape' has it level. */
	orientation: 'portrait' | 'landscape';
	/** Strips along a module's long side: side by side in portrait, one above the other in landscape. */
	groupsPerModule: number;
	/** Modules in series; strings fill the table row by row from the bottom left, the last may be shorter. */
	modulesPerString: number;
	/** One module with its share of the joints, metres: along the level axis and up the slope. */
	moduleWidthM: number;
	moduleHeightM: number;
}

/**
 * Grid of modules of a table. Sizes follow from the glass: (width - centre gap) / columns, height / rows, metres. An
 * orientation that the model leaves out is read from the modules' own shape; a square module counts as portrait.
 * Joints between modules (about 2 cm, common practice, no source) are not taken off.
 */
export function moduleGrid(
	model: Pick<
		TrackerModel,
		| 'widthM'
		| 'heightM'
		| 'centreGapM'
		| 'moduleColumns'
		| 'moduleRows'
		| 'moduleOrientation'
		| 'groupsPerModule'
		| 'modulesPerString'
	>
): ModuleGrid {
	const columns = model.moduleColumns;
	const rows = model.moduleRows;
	const moduleWidthM = (model.widthM - model.centreGapM) / columns;
	const moduleHeightM = model.heightM / rows;
	return {
		columns,
		rows,
		orientation: model.moduleOrientation ?? (moduleWidthM > moduleHeightM ? 'landscape' : 'portrait'),
		groupsPerModule: model.groupsPerModule ?? COMMON_GROUPS_PER_MODULE,
		modulesPerString: Math.min(model.modulesPerString ?? columns * rows, columns * rows),
		moduleWidthM,
		moduleHeightM
	};
}
