// Time from asking for a run to its stored result, over HTTP, against a server that runs:
//   node tests/bench/stored-run.mjs <address> <token of a team owner> [trackers] [kind] [repeats]
// Each repeat shifts the field by a millimetre, so that no stored run answers. One JSON object on the last line.

const [address, token, trackerText = '100', kind = 'shade', repeatText = '5'] = process.argv.slice(2);
if (!address || !token) {
	console.error(
		'usage: node tests/bench/stored-run.mjs <address> <token> [trackers] [shade|mounts] [repeats]'
	);
	process.exit(2);
}

async function call(method, path, body, headers = {}) {
	const response = await fetch(`${address}/api/v1${path}`, {
		method,
		headers: { authorization: `Bearer ${token}`, 'content-type': 'application/json', ...headers },
		body: body === undefined ? undefined : JSON.stringify(body)
	});
	const text = await response.text();
	if (!response.ok) throw new Error(`${method} ${path}: ${response.status} ${text}`);
	return text ? JSON.parse(text) : null;
}

const me = await call('GET', '/me');
const { items: models } = await call('GET', `/teams/${me.teams[0].id}/models`);
const model = models.find((one) => one.id === 'library-ormeva-24') ?? models[0];
const count = Number(trackerText);
const columns = Math.ceil(Math.sqrt(count));

function layout(shiftM) {
	const trackers = Array.from({ length: count }, (_, index) => {
		const row = Math.floor(index / columns);
		return {
			id: `t${index}`,
			tag: `T${index}`,
			modelId: model.id,
			eastM: (index % columns) * 13 + (row % 2) * 6.5 + shiftM,
			northM: 500 - row * 10.5,
			axisHeightM: null,
			posture: { kind: 'following' }
		};
	});
	return { version: 1, models: [model], trackers, mounts: { common: null, exceptions: {}, fromRunId: null } };
}

const place = { latitudeDeg: 41.2, longitudeDeg: 15.1, altitudeM: 420, timeZone: 'Europe/Rome' };
const project = await call('POST', '/projects', { name: 'Bench (invented)', place, teamId: me.teams[0].id });
const figures = [];
try {
	const { items } = await call('GET', `/projects/${project.id}/layouts`);
	const layoutId = items[0].id;
	for (let repeat = 0; repeat < Number(repeatText); repeat += 1) {
		const document = layout(repeat / 1000);
		await call('PUT', `/layouts/${layoutId}`, { document }, { 'if-match': `"${repeat + 1}"` });
		const began = performance.now();
		let run = await call('POST', `/projects/${project.id}/runs`, { kind, layoutId, stepMinutes: 10 });
		const askedMs = performance.now() - began;
		while (run.status === 'queued' || run.status === 'working') {
			await new Promise((resume) => setTimeout(resume, 20));
			run = await call('GET', `/runs/${run.id}`);
		}
		const storedMs = performance.now() - began;
		if (run.status !== 'done') throw new Error(`the run has ${run.status}: ${run.error}`);
		const again = performance.now();
		await call('POST', `/projects/${project.id}/runs`, { kind, layoutId, stepMinutes: 10 });
		const repeatMs = performance.now() - again;
		figures.push({ askedMs, storedMs, computeMs: run.computeMs, repeatMs });
		console.log(
			Object.entries(figures.at(-1))
				.map(([name, ms]) => `${name} ${ms.toFixed(0)}`)
				.join('  ')
		);
	}
} finally {
	await call('DELETE', `/projects/${project.id}`);
}

const median = (name) =>
	figures.map((one) => one[name]).sort((a, b) => a - b)[Math.floor(figures.length / 2)];
console.log(
	JSON.stringify({
		trackers: count,
		kind,
		medianMs: Object.fromEntries(Object.keys(figures[0]).map((name) => [name, Math.round(median(name))]))
	})
);
