import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { getPlot } from '$lib/server/projects/get-plot';
import { savePlot } from '$lib/server/projects/save-plot';

export const GET = endpoint(apiCalls.getPlot, async ({ actor, params }) => {
	const plot = await getPlot(actor, params.projectId);
	return answer(plot, { revision: plot.revision });
});

export const PUT = endpoint(apiCalls.savePlot, async ({ actor, params, body, revision }) => {
	const saved = await savePlot(actor, params.projectId, body.document, revision);
	return answer(saved, { revision: saved.revision });
});
