import * as contract from '#shared/api/invitations.ts';
import { readSessionOf } from '../accounts/service.ts';
import { authorizeInvitation } from '../http/authorize.ts';
import { bind, bindForVisitors, type BoundEndpoint } from '../http/bind.ts';
import type { Services } from '../services.ts';
import * as service from './service.ts';

export function invitationRoutes(services: Services): BoundEndpoint[] {
  return [
    bindForVisitors(contract.readInvitation, ({ body }) =>
      service.readInvitation(services, body.token),
    ),
    bindForVisitors(contract.acceptInvitation, async ({ body }, caller) => {
      const { userId, studioSlug, projectId } = await service.acceptInvitation(
        services,
        caller.person,
        body.token,
        body.newAccount,
      );
      await caller.startSession(userId);
      return { session: await readSessionOf(services, userId), studioSlug, projectId };
    }),
    bind(contract.revokeInvitation, async ({ params }, { person }) => {
      const may = await authorizeInvitation(services.db, person, params.invitationId);
      await service.revokeInvitation(services, may);
      return null;
    }),
  ];
}
