import {
  inviteToProject,
  listProjectInvitations,
  listProjectMembers,
  putAssistantOnProject,
  removeProjectMember,
  type Project,
} from '#shared/api/projects.ts';
import { listStudioMembers } from '#shared/api/studios.ts';
import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { call } from '../../app/api-client.ts';
import { errorText } from '../../app/error-text.ts';
import { usePagedList } from '../../app/paged-list.tsx';
import { useUser } from '../../app/require-session.tsx';
import { Button } from '../../ui/button.tsx';
import { toastDone, toastFailed } from '../../ui/toast.tsx';
import { InviteForm } from '../people/invite-form.tsx';
import { PeoplePanel } from '../people/people-panel.tsx';

type AssistantsProps = { project: Project; studioId: string; alreadyOn: ReadonlySet<string> };

/** The owner puts assistants of the studio on the project, one button each. */
function PutAssistantsOn({ project, studioId, alreadyOn }: AssistantsProps) {
  const client = useQueryClient();
  const members = useQuery({
    queryKey: ['studios', studioId, 'assistants'],
    queryFn: ({ signal }) =>
      call(listStudioMembers, { params: { studioId }, query: { limit: 100 } }, signal),
  });
  const put = useMutation({
    mutationFn: (userId: string) =>
      call(putAssistantOnProject, { params: { projectId: project.id, userId } }),
    onSuccess: async () => {
      toastDone('The assistant sees this project now.');
      await client.invalidateQueries({ queryKey: ['projects', project.id, 'members'] });
    },
    onError: (error) => {
      toastFailed(errorText(error).title);
    },
  });
  const free = (members.data?.items ?? []).filter(
    (member) => member.role === 'assistant' && !alreadyOn.has(member.userId),
  );
  if (free.length === 0) return null;
  return (
    <div className="mb-5">
      <p className="text-small font-medium">Assistants of the studio</p>
      <ul className="mt-2 flex flex-wrap gap-2">
        {free.map((member) => (
          <li key={member.userId}>
            <Button
              size="small"
              busy={put.isPending && put.variables === member.userId}
              onClick={() => {
                put.mutate(member.userId);
              }}
            >
              Put {member.name} on it
            </Button>
          </li>
        ))}
      </ul>
    </div>
  );
}

/** Who is in the project; owner and artist invite. */
export function ProjectPeople({ project }: { project: Project }) {
  const user = useUser();
  const params = { projectId: project.id };
  const membersKey = ['projects', project.id, 'members'];
  const invitationsKey = ['projects', project.id, 'invitations'];
  const owns = project.role === 'owner';
  const mayInvite = owns || project.role === 'artist';
  const members = usePagedList(membersKey, (query, signal) =>
    call(listProjectMembers, { params, query }, signal),
  );
  const invitations = usePagedList(
    invitationsKey,
    (query, signal) => call(listProjectInvitations, { params, query }, signal),
    mayInvite,
  );
  const people = members.data?.pages.flatMap((page) => page.items) ?? [];
  return (
    <PeoplePanel
      title="People"
      members={members}
      membersKey={membersKey}
      invitations={invitations}
      invitationsKey={invitationsKey}
      emptyWords="Nobody is invited yet."
      mayRemove={(member) =>
        member.userId !== user.id &&
        (owns || (project.role === 'artist' && member.role === 'bandmate'))
      }
      remove={(member) =>
        call(removeProjectMember, { params: { projectId: project.id, userId: member.userId } })
      }
      removalWords="They no longer see this project or its reports. You can invite them again."
      inviteForm={
        mayInvite && (
          <>
            {owns && project.studio !== null && (
              <PutAssistantsOn
                project={project}
                studioId={project.studio.id}
                alreadyOn={new Set(people.map((member) => member.userId))}
              />
            )}
            <InviteForm
              label={owns ? 'Invite the artist or a bandmate' : 'Invite a bandmate'}
              roles={owns ? ['artist', 'bandmate'] : ['bandmate']}
              invitationsKey={invitationsKey}
              invite={(email, role) => call(inviteToProject, { params, body: { email, role } })}
            />
          </>
        )
      }
    />
  );
}
