import type { Role } from '$lib/access';
import { can } from '$lib/access';

export type StepKey = 'plot' | 'trackers' | 'shade' | 'sensors' | 'plan' | 'site';

export interface TrailStep {
	key: StepKey;
	label: string;
	/** nothing yet, something open, or settled. */
	state: 'nothing' | 'open' | 'working' | 'settled';
	/** Open findings, where they can be counted. */
	count: number;
	/** One line of what is next, or of what stands. */
	next: string;
}

interface RunFacts {
	status: 'queued' | 'working' | 'done' | 'failed' | 'cancelled';
	outOfDate: boolean;
}

/** What the trail is told from: documents as they stand on the page, runs and plans as they were loaded. */
export interface TrailFacts {
	role: Role;
	boundaryParts: number;
	trackers: number;
	/** Findings about the layout, the missing boundary left out. */
	findings: number;
	shade: RunFacts | null;
	mounts: RunFacts | null;
	/** null while it is not known. */
	winterRuleBrokenBy: number | null;
	/** False when the shortest day never puts the rule to the test. */
	winterRuleTested?: boolean;
	mountChosen: boolean;
	/** Plans of this layout, newest first. */
	plans: { revision: string; layoutRevision: number; plotRevision: number }[];
	layoutRevision: number;
	plotRevision: number;
}

type Told = Pick<TrailStep, 'state' | 'next'> & { count?: number };

const plural = (count: number, one: string, many = `${one}s`) => `${count} ${count === 1 ? one : many}`;

function plot(facts: TrailFacts): Told {
	return facts.boundaryParts
		? { state: 'settled', next: 'Boundary drawn. Skyline and obstacles sharpen the shade.' }
		: { state: 'nothing', next: 'Next: draw the boundary or bring it in as a file.' };
}

function trackers(facts: TrailFacts): Told {
	if (!facts.trackers) return { state: 'nothing', next: 'Next: place trackers or fill the plot.' };
	if (facts.findings) {
		return {
			state: 'open',
			count: facts.findings,
			next: `Next: look at ${plural(facts.findings, 'open finding')}.`
		};
	}
	return { state: 'settled', next: `${plural(facts.trackers, 'tracker')}, no open findings.` };
}

function runState(run: RunFacts | null, what: string): Told | null {
	if (!run || run.status === 'cancelled') return { state: 'nothing', next: `Next: compute ${what}.` };
	if (run.status === 'queued' || run.status === 'working')
		return { state: 'working', next: `Computing ${what}.` };
	if (run.status === 'failed')
		return { state: 'open', count: 1, next: `Computing ${what} failed: start it again.` };
	if (run.outOfDate)
		return { state: 'open', count: 1, next: `Next: compute ${what} again, the layout has changed.` };
	return null;
}

function shade(facts: TrailFacts): Told {
	const run = runState(facts.shade, 'the year of shade');
	if (run) return run;
	const broken = facts.winterRuleBrokenBy;
	if (broken)
		return { state: 'open', count: broken, next: `Winter rule broken by ${plural(broken, 'tracker')}.` };
	const met = broken === 0 && facts.winterRuleTested !== false;
	return { state: 'settled', next: met ? 'Year computed, winter rule met.' : 'Year computed.' };
}

function sensors(facts: TrailFacts): Told {
	const run = runState(facts.mounts, 'the mounts');
	if (facts.mountChosen && (!run || facts.mounts === null))
		return { state: 'settled', next: 'Mount chosen.' };
	if (run) return run;
	return { state: 'open', count: 1, next: 'Next: choose where the sensor goes.' };
}

function plan(facts: TrailFacts): Told {
	const last = facts.plans[0];
	if (!last) return { state: 'nothing', next: 'Next: issue the plan.' };
	const layout = last.layoutRevision !== facts.layoutRevision;
	if (!layout && last.plotRevision === facts.plotRevision)
		return { state: 'settled', next: `Revision ${last.revision} is issued.` };
	const what = layout ? 'layout' : 'plot';
	return {
		state: 'open',
		count: 1,
		next: `The ${what} has changed since revision ${last.revision} was issued.`
	};
}

function site(facts: TrailFacts): Told {
	return facts.plans.length
		? { state: 'open', next: `The crew builds from revision ${facts.plans[0].revision}.` }
		: { state: 'nothing', next: 'The crew starts once a plan is issued.' };
}

const steps: { key: StepKey; label: string; tell: (facts: TrailFacts) => Told }[] = [
	{ key: 'plot', label: 'Plot', tell: plot },
	{ key: 'trackers', label: 'Trackers', tell: trackers },
	{ key: 'shade', label: 'Shade', tell: shade },
	{ key: 'sensors', label: 'Sensors', tell: sensors },
	{ key: 'plan', label: 'Plan', tell: plan },
	{ key: 'site', label: 'Site', tell: site }
];

/** The walk along the job, in the job's order; steps that a role may not open are not on its way. */
export function trailSteps(facts: TrailFacts): TrailStep[] {
	const readsPlans = can(facts.role, 'plan.read');
	return steps
		.filter(({ key }) => readsPlans || (key !== 'plan' && key !== 'site'))
		.map(({ key, label, tell }) => ({ key, label, count: 0, ...asRead(tell(facts), facts.role) }));
}

/** Who may not edit is told how things stand, not what to do next. */
function asRead(told: Told, role: Role): Told {
	if (can(role, 'layout.edit') || !told.next.startsWith('Next: ')) return told;
	return { ...told, next: told.state === 'nothing' ? 'The designer has not begun this yet.' : 'Still open.' };
}
