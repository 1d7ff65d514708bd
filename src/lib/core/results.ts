/**
 * What the core's runs take and give back. Metres, degrees, hours, W/m² and kWh/m²; times are UTC milliseconds.
 * Months 0..11, hours 0..23 of local standard time at the place (whole-hour offset nearest to the longitude is
 * not used: the caller passes `utcOffsetMinutes`).
 */
import type { Layout, Mount, MountEdge, Place, Plot, WinterRule } from './document';

export interface RunInput {
	place: Place;
	plot: Plot;
	layout: Layout;
	winterRule: WinterRule;
	/** Calendar year that is computed. */
	year: number;
	/** 1..20 minutes, mid-interval steps. */
	stepMinutes: number;
	/** Site standard-time offset used to sort results into days and clock hours. */
	utcOffsetMinutes: number;
	/** Years that the trees have grown since the plot was recorded. */
	treeYears: number;
	/** What the year's energy is computed from; left out, the run answers the shade alone. */
	energy?: EnergySettings;
}

/** Where the light of an energy year comes from. */
export type EnergySky =
	| {
			/** A year without a cloud: Ineichen and Perez 2002. */
			source: 'clear';
			/** Linke turbidity by month, January first; left out, the rule of `defaultLinkeTurbidity`. */
			linkeTurbidity?: number[];
	  }
	| {
			/** An average year from monthly sums of global horizontal irradiation, kWh/m², January first. */
			source: 'average';
			monthlyHorizontalKwhM2: number[];
	  }
	| {
			/** The hours of a weather file. */
			source: 'weather';
			name: string;
			/** Where the file was made for; degrees, metres. */
			latitudeDeg: number;
			longitudeDeg: number;
			altitudeM: number;
			/** Of the file's local standard time, east positive. */
			utcOffsetHours: number;
			/** Runs of hours without a gap: beginning of the first one, UTC, and how many follow. */
			spans: { startMs: number; hours: number }[];
			/** Means over each hour, W/m², in the order of the spans; null where the file has none. */
			ghi: (number | null)[];
			dni: (number | null)[];
			dhi: (number | null)[];
	  };

export type EnergySkyModel = 'hay-davies' | 'perez' | 'isotropic';

export interface EnergySettings {
	sky: EnergySky;
	/** How the sky's diffuse light reaches a tilted table. */
	skyModel: EnergySkyModel;
	/** Share of light that the ground sends back, 0..1: one number or twelve, January first. */
	albedo: number | number[];
}

/** Light on a table by where it comes from, kWh/m² of glass. */
export interface EnergyParts {
	beam: number;
	/** Sky light from about the sun: shaded as the beam is. */
	circumsolar: number;
	/** Evenly from the sky that the table sees. */
	isotropic: number;
	/** Of the bright (or dark) band at the horizon; may be below 0. */
	horizon: number;
	/** Sent back by the ground. */
	ground: number;
	total: number;
}

/** Never one number where a range is meant. */
export interface EnergyRange {
	low: number;
	likely: number;
	high: number;
}

/** Losses as shares of all the light that would come without neighbours and obstacles, 0..1; they add up. */
export interface EnergyLosses {
	/** Beam that is shaded, by area. */
	beam: number;
	/** Sky light taken: circumsolar with the beam, the rest by the sky that is covered. */
	sky: number;
	/** What partly shaded strings lose beyond the shaded area: from nothing to the worst wiring. */
	electrical: EnergyRange;
	/** All three. */
	total: EnergyRange;
}

/** The same three losses by month or by hour of standard time; null while there is no light. */
export interface EnergyLossSeries {
	beam: (number | null)[];
	sky: (number | null)[];
	/** Likely. */
	electrical: (number | null)[];
}

export interface TrackerEnergy {
	trackerId: string;
	tag: string;
	without: EnergyParts;
	with: EnergyParts;
	losses: EnergyLosses;
	/** Twelve. */
	months: EnergyLossSeries;
	/** Twenty-four. */
	hours: EnergyLossSeries;
}

/** One reason why the year could be otherwise, in words. Points are hundredths of the light without shade. */
export interface EnergyReason {
	id: 'strings' | 'sky-model' | 'weather' | 'heights' | 'ground' | 'sky-view' | 'steps' | 'place';
	words: string;
	/** How far it could lower or raise what the field receives, points; null where it is not known. */
	lessPoints: number | null;
	morePoints: number | null;
}

export interface EnergyResult {
	model: {
		sky: string;
		skyModel: string;
		ground: string;
		skyView: string;
		strings: string;
		steps: number;
		/** As computed: it divides the hour or the day that the source is made of. */
		stepMinutes: number;
		/** Linke turbidity that was used; null when the source needs none. */
		linkeTurbidity: number[] | null;
	};
	/** Of the sky, before any table, kWh/m²: the year and its months. */
	horizontal: {
		globalKwhM2: number;
		diffuseKwhM2: number;
		directNormalKwhM2: number;
		monthlyGlobalKwhM2: number[];
		/** Given but in no step, because the sun stays down. */
		unplacedKwhM2: number;
	};
	/** Of a weather file: global less diffuse and direct x cos z with the sun of mid-hour, W/m². */
	closure: { meanWm2: number; rmsWm2: number; maxWm2: number; hours: number } | null;
	/** Hours of a weather file that lack a value and count as dark. */
	missingHours: number;
	field: {
		/** Means over the field's glass. */
		without: EnergyParts;
		with: EnergyParts;
		losses: EnergyLosses;
		months: EnergyLossSeries;
		hours: EnergyLossSeries;
		/** Light without shade by month, kWh/m². */
		monthlyWithoutKwhM2: number[];
		/**
		 * Light after shade and strings over 1 kW/m², hours at full load. It holds no losses of modules, cables and
		 * inverters; the reference yield of IEC 61724-1 is taken before any loss.
		 */
		referenceYieldH: EnergyRange;
		/** Rated power of all tables, kW. */
		ratedKw: number;
		/** The other sky model on the same field. */
		otherModel: { skyModel: EnergySkyModel; withoutKwhM2: number; withKwhM2: number; totalLoss: number };
		worstTrackerId: string | null;
	};
	trackers: TrackerEnergy[];
	reasons: EnergyReason[];
}

export interface TrackerShade {
	trackerId: string;
	tag: string;
	/** 1 - beam with shade / beam without, over the year, 0..1. */
	beamLoss: number;
	/** Time-mean of the shaded share while the sun is above horizon and skyline and in front of the table, 0..1. */
	meanShadedShare: number;
	/** Hours of the year with any shade from neighbours or obstacles while the front faces the sun. */
	shadedHours: number;
	/** Beam on the table without and with shade, kWh/m² a year. */
	beamKwhM2: number;
	beamLitKwhM2: number;
	/** [month][hour]: beam loss in that month and hour, 0..1; null while there is no beam. */
	monthHourLoss: (number | null)[][];
	/** [month]: beam loss, 0..1. */
	monthLoss: number[];
	/** Shortest day: highest sun elevation at which it is still shaded, degrees; null when never shaded. */
	shadedUpToDeg: number | null;
	/** The winter rule for this tracker. */
	meetsWinterRule: boolean;
}

export interface ShadeResult {
	coreVersion: string;
	model: { sun: string; beam: string; steps: number; daylightHours: number };
	field: {
		beamLoss: number;
		meanShadedShare: number;
		worstTrackerId: string | null;
		monthLoss: number[];
		monthHourLoss: (number | null)[][];
		beamKwhM2: number;
		beamLitKwhM2: number;
	};
	trackers: TrackerShade[];
	shortestDay: DayShade;
	winterRule: WinterVerdict;
	/** The year's energy, when it was asked for. */
	energy?: EnergyResult | null;
}

export interface DayShade {
	/** ISO date at the site, `2026-12-21`. */
	date: string;
	timesMs: number[];
	sunAzimuthDeg: number[];
	/** Apparent. */
	sunElevationDeg: number[];
	/** True while the skyline hides the sun: then every share is 1 and there is no beam. */
	sunHidden: boolean[];
	/** Mean over the trackers whose front faces the sun at each time. */
	fieldShare: number[];
	/** [tracker][time], 0..1; 1 while the sun is hidden or behind the table. */
	shares: number[][];
	/**
	 * By tracker: highest apparent sun elevation of the day, degrees, at which neighbours or obstacles still shade more
	 * than a thousandth of it; refined between the steps to about 0.01 degrees. Null when it is never shaded.
	 */
	shadedUpToDeg: (number | null)[];
	/** Trackers and times [tracker, time] at which a table has its back to the sun; these break no rule. */
	backToSun: [tracker: number, time: number][];
	/** Beam lost to shade over beam without, this day. */
	beamLoss: number;
	/** Same, by tracker. */
	trackerBeamLoss: number[];
}

export interface WinterVerdict {
	rule: WinterRule;
	date: string;
	met: boolean;
	/** Tags that break it, worst first. */
	brokenBy: { trackerId: string; tag: string; shadedUpToDeg: number; minutes: number }[];
	/** Sun elevation above which no tracker of the field is shaded on the shortest day; null when never shaded. */
	clearAboveDeg: number | null;
	/** Minutes of the day that the rule looks at, with the sun above the skyline; 0 when it asks for nothing that day. */
	judgedMinutes: number;
}

export interface MountPlaceResult {
	mount: Mount;
	/** Hours of the year that the head is shaded while the sun is up (above the skyline). */
	shadedHours: number;
	/** Same with the sun above 5 degrees. */
	shadedAbove5Hours: number;
	/** Head shaded while at least half of its own table is lit, hours a year. */
	blindHours: number;
	/** Longest unbroken blind run on any day, minutes. */
	longestBlindMinutes: number;
	/** Longest unbroken head shade on any day with the sun above 3 degrees, minutes. */
	longestRunMinutes: number;
	longestRunDate: string | null;
	/** Mean and worst minutes from first sun on the table to the head having it. */
	runUpMeanMinutes: number;
	runUpWorstMinutes: number;
	/** [month]: blind hours. */
	blindByMonth: number[];
}

export type MountClass = 'clear' | 'sound' | 'watch' | 'unfit';

export interface TrackerMounts {
	trackerId: string;
	tag: string;
	edges: Record<MountEdge, MountPlaceResult[]>;
	best: MountPlaceResult;
	/** Class of the best place and the measure that decides it, in words. */
	bestClass: MountClass;
	bestReason: string;
	/** The field's common place on this tracker. */
	common: MountPlaceResult;
	commonClass: MountClass;
	commonReason: string;
}

export interface MountResult {
	coreVersion: string;
	/** True when every table is alike, follows, and stands on level ground with no obstacle: neighbours never shade the top edge. */
	levelGroundTruth: boolean;
	common: Mount;
	commonClassCounts: Record<MountClass, number>;
	/** Share of trackers for which the common place is clear or sound, 0..1. */
	commonServesShare: number;
	/** Trackers for which the common place is worse than sound, with the place to use there. */
	exceptions: { trackerId: string; tag: string; mount: Mount; class: MountClass; reason: string }[];
	trackers: TrackerMounts[];
}
