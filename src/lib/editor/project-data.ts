import type { Role } from '$lib/access';
import type { Layout, Place, Plot, TrackerModel, WinterRule } from '$lib/core';

/** What the project pages load and the store works on. */
export interface ProjectInfo {
	id: string;
	name: string;
	place: Place;
	winterRule: WinterRule;
	role: Role;
}

export interface ProjectData {
	project: ProjectInfo;
	plot: { document: Plot; revision: number };
	layout: { id: string; name: string; revision: number; document: Layout };
	/** Library and the team's own. */
	models?: TrackerModel[];
	/** Keeps unsaved work of two people on one device apart. */
	userId?: string;
}

/** Both documents of a project page: what undo goes back and forth over. */
export interface Documents {
	plot: Plot;
	layout: Layout;
}
