import type { InvitedRole } from '#shared/api/invitations.ts';
import type { ProjectRole } from '#shared/api/projects.ts';

/** What people are called where they are listed. */
export const roleWords: Record<InvitedRole | ProjectRole, string> = {
  owner: 'engineer',
  assistant: 'assistant',
  artist: 'artist',
  bandmate: 'bandmate',
};
