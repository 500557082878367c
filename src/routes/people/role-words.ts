import type { InvitedRole } from '#shared/api/invitations.ts';
import type { ProjectRole } from '#shared/api/projects.ts';

/** What people are called in a list: "Tobi Adler, assistant". */
export const roleWords: Record<InvitedRole | ProjectRole, string> = {
  owner: 'engineer',
  assistant: 'assistant',
  artist: 'artist',
  bandmate: 'bandmate',
};

/** The same in a sentence: "You are the engineer here." */
export const roleInSentence: Record<ProjectRole, string> = {
  owner: 'the engineer',
  assistant: 'an assistant',
  artist: 'the artist',
  bandmate: 'a bandmate',
};
