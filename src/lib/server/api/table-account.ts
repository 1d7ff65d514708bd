import { z } from 'zod';
import * as shapes from '$lib/schema/account';
import { pageQuerySchema, pageSchema } from '$lib/schema/page';
import { call } from './spec';

const tag = 'account';

export const accountCalls = {
	openapi: call({
		method: 'GET',
		path: '/api/v1/openapi.json',
		summary: 'This description',
		tag,
		scope: null,
		answer: { status: 200, description: 'OpenAPI 3.1', schema: z.looseObject({ openapi: z.string() }) }
	}),
	me: call({
		method: 'GET',
		path: '/api/v1/me',
		summary: 'Who the caller is, and in which teams',
		tag,
		answer: { status: 200, description: 'The caller', schema: shapes.meSchema }
	}),
	listTokens: call({
		method: 'GET',
		path: '/api/v1/tokens',
		summary: 'Personal tokens of the caller, newest first',
		tag,
		query: pageQuerySchema,
		answer: { status: 200, description: 'A page of tokens', schema: pageSchema(shapes.tokenSchema) }
	}),
	createToken: call({
		method: 'POST',
		path: '/api/v1/tokens',
		summary:
			'Make a personal token; its text is shown this once. Made with a token, it ends with that at the latest',
		tag,
		body: shapes.newTokenSchema,
		answer: { status: 201, description: 'The token and its text', schema: shapes.madeTokenSchema }
	}),
	deleteToken: call({
		method: 'DELETE',
		path: '/api/v1/tokens/{tokenId}',
		summary: 'Withdraw a token at once',
		tag,
		answer: { status: 204, description: 'Gone' }
	}),
	listMembers: call({
		method: 'GET',
		path: '/api/v1/teams/{teamId}/members',
		summary: 'Members of a team and of its projects',
		tag: 'teams',
		query: pageQuerySchema,
		answer: { status: 200, description: 'A page of members', schema: pageSchema(shapes.memberSchema) }
	}),
	removeMember: call({
		method: 'DELETE',
		path: '/api/v1/teams/{teamId}/members/{userId}',
		summary: 'Take a person out of a team and its projects; the last owner stays',
		tag: 'teams',
		answer: { status: 204, description: 'Gone' }
	}),
	listInvitations: call({
		method: 'GET',
		path: '/api/v1/teams/{teamId}/invitations',
		summary: 'Invitations that wait for an answer',
		tag: 'teams',
		query: pageQuerySchema,
		answer: { status: 200, description: 'A page of invitations', schema: pageSchema(shapes.invitationSchema) }
	}),
	invite: call({
		method: 'POST',
		path: '/api/v1/teams/{teamId}/invitations',
		summary: 'Invite a person by e-mail into the team or into one project',
		tag: 'teams',
		cost: 5,
		body: shapes.invitationRequestSchema,
		answer: { status: 201, description: 'The invitation', schema: shapes.invitationSchema }
	}),
	withdrawInvitation: call({
		method: 'DELETE',
		path: '/api/v1/invitations/{invitationId}',
		summary: 'Withdraw an invitation',
		tag: 'teams',
		answer: { status: 204, description: 'Gone' }
	})
};
