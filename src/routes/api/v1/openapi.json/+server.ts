import { answer, endpoint } from '$lib/server/api/endpoint';
import { openApiDocument } from '$lib/server/api/openapi';
import { apiCalls } from '$lib/server/api/table';

export const GET = endpoint(apiCalls.openapi, () => answer(openApiDocument()));
