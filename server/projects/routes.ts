import * as contract from '#shared/api/projects.ts';
import {
  authorizeProject,
  authorizeRemoval,
  authorizeSong,
  authorizeStudio,
} from '../http/authorize.ts';
import { bind, type BoundEndpoint } from '../http/bind.ts';
import { inviteToProject, listProjectInvitations } from '../invitations/service.ts';
import type { Services } from '../services.ts';
import * as service from './service.ts';

export function projectRoutes(services: Services): BoundEndpoint[] {
  const { db } = services;
  return [
    bind(contract.listMyProjects, ({ query }, { person }) =>
      service.listMyProjects(services, person, query),
    ),
    bind(contract.getProject, async ({ params }, { person }) => {
      const may = await authorizeProject(db, person, params.projectId, 'read-project');
      return service.getProject(services, may);
    }),
    bind(contract.createProject, async ({ params, body }, { person }) => {
      const may = await authorizeStudio(db, person, { id: params.studioId }, 'open-project');
      return service.createProject(services, may, body);
    }),
    bind(contract.listProjectMembers, async ({ params, query }, { person }) => {
      const may = await authorizeProject(db, person, params.projectId, 'read-project');
      return service.listMembers(services, may, query);
    }),
    bind(contract.putAssistantOnProject, async ({ params }, { person }) => {
      const may = await authorizeProject(db, person, params.projectId, 'manage-assistants');
      await service.putAssistantOnProject(services, may, params.userId);
      return null;
    }),
    bind(contract.removeProjectMember, async ({ params }, { person }) => {
      const may = await authorizeRemoval(db, person, params.projectId, params.userId);
      await service.removeMember(services, may);
      return null;
    }),
    bind(contract.inviteToProject, async ({ params, body }, { person }) => {
      const action = body.role === 'artist' ? 'invite-artist' : 'invite-bandmate';
      const may = await authorizeProject(db, person, params.projectId, action);
      return inviteToProject(services, may, body.email, body.role);
    }),
    bind(contract.listProjectInvitations, async ({ params, query }, { person }) => {
      const may = await authorizeProject(db, person, params.projectId, 'read-invitations');
      return listProjectInvitations(services, may, query);
    }),
    bind(contract.listSongs, async ({ params, query }, { person }) => {
      const may = await authorizeProject(db, person, params.projectId, 'read-project');
      return service.listSongs(services, may, query);
    }),
    bind(contract.createSong, async ({ params, body }, { person }) => {
      const may = await authorizeProject(db, person, params.projectId, 'add-song');
      return service.createSong(services, may, body.title);
    }),
    bind(contract.getSong, async ({ params }, { person }) => {
      const may = await authorizeSong(db, person, params.songId, 'read-project');
      return service.getSong(services, may);
    }),
  ];
}
