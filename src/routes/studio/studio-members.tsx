import {
  inviteAssistant,
  listStudioInvitations,
  listStudioMembers,
  removeStudioMember,
} from '#shared/api/studios.ts';
import { call } from '../../app/api-client.ts';
import { usePagedList } from '../../app/paged-list.tsx';
import { useUser } from '../../app/require-session.tsx';
import { InviteForm } from '../people/invite-form.tsx';
import { PeoplePanel } from '../people/people-panel.tsx';

/** The people of a studio and the invitations that are out; for its owner. */
export function StudioMembers({ studioId }: { studioId: string }) {
  const user = useUser();
  const params = { studioId };
  const membersKey = ['studios', studioId, 'members'];
  const invitationsKey = ['studios', studioId, 'invitations'];
  const members = usePagedList(membersKey, (query, signal) =>
    call(listStudioMembers, { params, query }, signal),
  );
  const invitations = usePagedList(invitationsKey, (query, signal) =>
    call(listStudioInvitations, { params, query }, signal),
  );
  return (
    <PeoplePanel
      title="People"
      lead="Assistants see the projects they are put on, not your rules, prices or agreements."
      members={members}
      membersKey={membersKey}
      invitations={invitations}
      invitationsKey={invitationsKey}
      mayRemove={(member) => member.userId !== user.id && member.role !== 'owner'}
      remove={(member) => call(removeStudioMember, { params: { studioId, userId: member.userId } })}
      removalWords="They lose the studio and all its projects at once. You can invite them again."
      inviteForm={
        <InviteForm
          label="Invite an assistant"
          roles={['assistant']}
          invitationsKey={invitationsKey}
          invite={(email) => call(inviteAssistant, { params, body: { email } })}
        />
      }
    />
  );
}
