/**
 * The documents that the core computes from: a place, a plot, tracker models and a layout.
 * Metres in the local east-north-up frame at the project's origin, aligned to true north;
 * degrees; azimuths clockwise from true north. Plain data: what is stored, sent and hashed.
 */

/** A point of the local ground plan: [east, north] in metres. */
export type PlanPoint = [eastM: number, northM: number];

export interface Place {
	/** -90..90, north positive, WGS84. */
	latitudeDeg: number;
	/** -180..180, east positive, WGS84. */
	longitudeDeg: number;
	/** Height of the origin above sea level, metres. */
	altitudeM: number;
	/** IANA name, for example `Europe/Rome`. Only for showing clock times; the core computes in UTC. */
	timeZone: string;
	/** Magnetic declination, east positive, as the user enters it; only shown and printed. */
	magneticDeclinationDeg: number;
}

/** One part of the land: rings are open (first point not repeated), outer counter-clockwise, holes clockwise. */
export interface BoundaryPart {
	outer: PlanPoint[];
	holes: PlanPoint[][];
}

/** A measured spot of the ground: [east, north, height] in metres. */
export type GroundPoint = [eastM: number, northM: number, heightM: number];

/** Height of the ground relative to the origin's datum: level, a plane through the origin, or measured. */
export type Ground =
	| { kind: 'level'; heightM: number }
	| {
			kind: 'plane';
			/** Height at the origin. */
			heightM: number;
			/** Rise in metres per 100 m. */
			risePercent: number;
			/** Bearing towards which the ground rises. */
			riseTowardsDeg: number;
	  }
	| {
			/** Triangles between measured spots; beyond the outermost ones the height of the nearest edge is held. */
			kind: 'points';
			points: GroundPoint[];
	  }
	| {
			/** Heights on a regular grid, straight between neighbours; beyond it the height of its edge is held. */
			kind: 'raster';
			/** Where the first height stands; the grid runs along true east and true north. */
			westM: number;
			southM: number;
			/** Distance between neighbouring heights. */
			cellM: number;
			columns: number;
			rows: number;
			/** Row by row from the south, each from west to east; null is a gap, filled from its neighbours. */
			heightsM: (number | null)[];
	  };

export interface SkylinePoint {
	azimuthDeg: number;
	elevationDeg: number;
}

export interface BoxObstacle {
	id: string;
	kind: 'box';
	name: string;
	eastM: number;
	northM: number;
	/** Size along east before the turn. */
	sizeXM: number;
	/** Size along north before the turn. */
	sizeYM: number;
	heightM: number;
	/** Clockwise turn about its centre, degrees. */
	turnDeg: number;
}

export interface TreeObstacle {
	id: string;
	kind: 'tree';
	name: string;
	eastM: number;
	northM: number;
	/** Top of the crown above ground, today. */
	heightM: number;
	/** Bottom of the crown above ground. */
	crownBaseM: number;
	crownRadiusM: number;
	trunkRadiusM: number;
	/** Share of the beam that passes the crown, 0 opaque .. 1 clear; of the bare crown where `leafTransmission` is given. */
	crownTransmission: number;
	growthMPerYear: number;
	/** Height at which it stops growing. */
	maxHeightM: number;
	/** Left out, an upright cylinder. */
	crownShape?: CrownShape;
	/** Share of the beam that passes the crown in leaf; left out, the crown passes the same all year. */
	leafTransmission?: number;
	/** First and last day of the year in leaf, 1..366, over the year's end if it must; left out, by hemisphere. */
	leafDays?: [from: number, to: number];
}

export type CrownShape = 'cylinder' | 'cone' | 'ellipsoid';

/** A roof: flat at the height of the walls, or two planes that meet in a ridge through the middle of the footprint. */
export type Roof =
	| { kind: 'flat' }
	| {
			kind: 'pitched';
			/** Ridge above the eaves. */
			riseM: number;
			/** Bearing that the ridge runs along. */
			ridgeDeg: number;
	  };

export interface BuildingObstacle {
	id: string;
	kind: 'building';
	name: string;
	/** What the corners are measured from. */
	eastM: number;
	northM: number;
	/** Footprint as offsets from (eastM, northM): an open ring, convex or not, either way round. */
	corners: PlanPoint[];
	/** Walls, to the eaves, above the ground under the middle of the footprint; they reach down to the lowest ground. */
	heightM: number;
	roof: Roof;
}

/** A wall, a fence or a hedge along a line; it follows the ground. */
export interface WallObstacle {
	id: string;
	kind: 'wall';
	name: string;
	/** What the line's points are measured from. */
	eastM: number;
	northM: number;
	/** Offsets from (eastM, northM), from end to end. */
	line: PlanPoint[];
	/** Above the ground under it. */
	heightM: number;
	thicknessM: number;
	/** Share of the beam that passes it: 0 a wall, more for a fence or a hedge. */
	transmission: number;
}

/** A mast, a chimney or a pole of an overhead line: upright and round. */
export interface MastObstacle {
	id: string;
	kind: 'mast';
	name: string;
	eastM: number;
	northM: number;
	heightM: number;
	radiusM: number;
}

export type Obstacle = BoxObstacle | TreeObstacle | BuildingObstacle | WallObstacle | MastObstacle;

export interface Plot {
	version: 1;
	/** Empty while nothing is drawn. */
	boundary: BoundaryPart[];
	ground: Ground;
	/** Linear between points, wrapped at 360; empty is a flat horizon. Sorted by azimuth. */
	skyline: SkylinePoint[];
	obstacles: Obstacle[];
	/** Distance that every reach circle keeps from the boundary, metres. */
	setBackM: number;
}

/** The arc that the azimuth may sweep, clockwise from an east-side to a west-side bearing; it may pass through north. */
export interface StopArc {
	fromDeg: number;
	toDeg: number;
}

export interface TrackerModel {
	id: string;
	name: string;
	/** Glass, along the level axis. */
	widthM: number;
	/** Glass, up the slope. */
	heightM: number;
	/** Steel outline beyond the glass on every side. */
	frameMarginM: number;
	/** Clear slot between the left and the right half of the table; the width includes it. 0 is none. */
	centreGapM: number;
	/** Tilt axis above ground. */
	axisHeightM: number;
	/** Tilt axis ahead of the azimuth axis, towards the facing direction. */
	tiltAxisOffsetM: number;
	/** Table plane ahead of the tilt axis, along the table normal. */
	tableOffsetM: number;
	/** Table centre up the slope from the tilt axis. */
	centreShiftM: number;
	minTiltDeg: number;
	maxTiltDeg: number;
	/** null turns freely. */
	stops: StopArc | null;
	/** Where the table rests at night; azimuthDeg null keeps the bearing it had. */
	night: { azimuthDeg: number | null; tiltDeg: number };
	/** Tilt in high wind. */
	windTiltDeg: number;
	/** Speed of turning about the upright axis, and of tilting unless that has its own. */
	slewDegPerS: number;
	/** Speed of tilting, degrees a second; left out, it is `slewDegPerS`. */
	tiltSlewDegPerS?: number;
	sensorHeadRadiusM: number;
	/** Half-angle of the sensor's view off its axis. */
	sensorViewDeg: number;
	/** Made length of the sensor lead. */
	sensorLeadM: number;
	moduleColumns: number;
	moduleRows: number;
	/** Long side of a module up the slope (portrait) or level (landscape); left out, it follows from the grid's shape. */
	moduleOrientation?: 'portrait' | 'landscape';
	/** Cell groups of a module with a bypass of their own, strips along its long side; left out, 3. */
	groupsPerModule?: number;
	/** Modules in series in one string, filled row by row from the bottom left; left out, the whole table. */
	modulesPerString?: number;
	/** Table power. */
	powerW: number;
}

export type Posture =
	| { kind: 'following' }
	| { kind: 'flat' }
	| { kind: 'night' }
	| { kind: 'wind' }
	| { kind: 'standing'; azimuthDeg: number; tiltDeg: number };

export interface Tracker {
	id: string;
	/** For example `B07`; unique in a layout. */
	tag: string;
	modelId: string;
	eastM: number;
	northM: number;
	/** Overrides the model's axis height; null keeps it. */
	axisHeightM: number | null;
	posture: Posture;
}

export type MountEdge = 'top' | 'bottom' | 'left' | 'right';

/** A place on the moving frame, seen facing the glass. */
export interface Mount {
	edge: MountEdge;
	/** From the middle of the edge: to the right on top and bottom, up on left and right, metres. */
	alongM: number;
	/** Outward beyond the glass edge in the table plane, metres; negative is inside the edge. */
	outM: number;
	/** In front of the glass, metres. */
	forwardM: number;
}

export interface MountChoice {
	/** One place for every tracker of the field, or null while nothing is chosen. */
	common: Mount | null;
	/** Trackers that have their own place, by tracker id. */
	exceptions: Record<string, Mount>;
	/** The mount run that the choice was made from. */
	fromRunId: string | null;
}

/** The rule a project accepts its winter by. */
export type WinterRule =
	/** No tracker shaded while the sun is above this height on the shortest day. */
	| { kind: 'clear-above'; elevationDeg: number }
	/** No tracker shaded between these solar hours on the shortest day. */
	| { kind: 'clear-window'; fromSolarHour: number; toSolarHour: number };

export interface Layout {
	version: 1;
	/** The models that its trackers use, kept with the layout so that it can always be computed again. */
	models: TrackerModel[];
	trackers: Tracker[];
	mounts: MountChoice;
}
