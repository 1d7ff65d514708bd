import { answer, endpoint } from '$lib/server/api/endpoint';
import { apiCalls } from '$lib/server/api/table';
import { describeMe } from '$lib/server/teams/describe-me';

export const GET = endpoint(apiCalls.me, async ({ actor }) => answer(await describeMe(actor)));
