import * as contract from '#shared/api/studios.ts';
import { authorizeStudio } from '../http/authorize.ts';
import { bind, type BoundEndpoint } from '../http/bind.ts';
import { inviteAssistant, listStudioInvitations } from '../invitations/service.ts';
import type { Services } from '../services.ts';
import * as service from './service.ts';

export function studioRoutes(services: Services): BoundEndpoint[] {
  const { db } = services;
  return [
    bind(contract.foundStudio, ({ body }, { person }) =>
      service.foundStudio(services, person, body),
    ),
    bind(contract.listMyStudios, ({ query }, { person }) =>
      service.listMyStudios(services, person, query),
    ),
    bind(contract.getStudio, async ({ params }, { person }) =>
      service.getStudio(services, await authorizeStudio(db, person, params, 'read-studio')),
    ),
    bind(contract.listStudioMembers, async ({ params, query }, { person }) => {
      const may = await authorizeStudio(db, person, { id: params.studioId }, 'manage-staff');
      return service.listMembers(services, may, query);
    }),
    bind(contract.removeStudioMember, async ({ params }, { person }) => {
      const may = await authorizeStudio(db, person, { id: params.studioId }, 'manage-staff');
      await service.removeMember(services, may, params.userId);
      return null;
    }),
    bind(contract.inviteAssistant, async ({ params, body }, { person }) => {
      const may = await authorizeStudio(db, person, { id: params.studioId }, 'manage-staff');
      return inviteAssistant(services, may, body.email);
    }),
    bind(contract.listStudioInvitations, async ({ params, query }, { person }) => {
      const may = await authorizeStudio(db, person, { id: params.studioId }, 'manage-staff');
      return listStudioInvitations(services, may, query);
    }),
  ];
}
