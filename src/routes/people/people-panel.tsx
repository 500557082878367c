import { revokeInvitation, type Invitation } from '#shared/api/invitations.ts';
import type { ProjectRole } from '#shared/api/projects.ts';
import { useMutation, useQueryClient, type QueryKey } from '@tanstack/react-query';
import { useState, type ReactNode } from 'react';
import { call } from '../../app/api-client.ts';
import { errorText } from '../../app/error-text.ts';
import { dayWords } from '../../app/moments.ts';
import { ListBody, type PagedList } from '../../app/paged-list.tsx';
import { Button } from '../../ui/button.tsx';
import { AlertDialog } from '../../ui/dialog.tsx';
import { Panel } from '../../ui/panel.tsx';
import { EmptyState } from '../../ui/states.tsx';
import { toastDone, toastFailed } from '../../ui/toast.tsx';
import { roleWords } from './role-words.ts';

export type Member = { userId: string; name: string; email: string; role: ProjectRole };

type PeoplePanelProps<M extends Member> = {
  title: string;
  lead?: string;
  members: PagedList<M>;
  membersKey: QueryKey;
  /** Where the person may invite. */
  invitations?: PagedList<Invitation> | undefined;
  invitationsKey: QueryKey;
  mayRemove: (member: M) => boolean;
  remove: (member: M) => Promise<unknown>;
  /** What losing the place means, asked before it happens. */
  removalWords: string;
  inviteForm?: ReactNode;
  /** Something more for a member's line. */
  emptyWords?: string;
};

/** An open invitation, which can be taken back. */
function InvitationRow({ invitation, listKey }: { invitation: Invitation; listKey: QueryKey }) {
  const client = useQueryClient();
  const revoke = useMutation({
    mutationFn: () => call(revokeInvitation, { params: { invitationId: invitation.id } }),
    onSuccess: async () => {
      toastDone('The invitation is taken back; its link no longer works.');
      await client.invalidateQueries({ queryKey: listKey });
    },
    onError: (error) => {
      toastFailed(errorText(error).title);
    },
  });
  return (
    <li className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 px-5 py-3 sm:px-6">
      <div className="min-w-0">
        <p className="text-small wrap-anywhere">{invitation.email}</p>
        <p className="text-small text-ink-2">
          invited as {roleWords[invitation.role]}, until {dayWords(invitation.expiresAt)}
        </p>
      </div>
      <Button
        size="small"
        busy={revoke.isPending}
        aria-label={`Take back the invitation to ${invitation.email}`}
        onClick={() => {
          revoke.mutate();
        }}
      >
        Take back
      </Button>
    </li>
  );
}

/** Who belongs here, who is invited, and inviting. */
export function PeoplePanel<M extends Member>({
  title,
  lead,
  members,
  membersKey,
  invitations,
  invitationsKey,
  mayRemove,
  remove,
  removalWords,
  inviteForm,
  emptyWords = 'Nobody else yet.',
}: PeoplePanelProps<M>) {
  const client = useQueryClient();
  const [leaving, setLeaving] = useState<M>();
  const removal = useMutation({
    mutationFn: remove,
    onSuccess: async (_, member) => {
      toastDone(`${member.name} was taken off.`);
      await client.invalidateQueries({ queryKey: membersKey });
    },
    onError: (error) => {
      toastFailed(errorText(error).title);
    },
    onSettled: () => {
      setLeaving(undefined);
    },
  });
  const open = invitations?.data?.pages.flatMap((page) => page.items) ?? [];
  return (
    <Panel title={title} lead={lead} flush>
      <ListBody list={members} words="Loading people…" empty={<EmptyState title={emptyWords} />}>
        {(items) => (
          <ul className="divide-y divide-line">
            {items.map((member) => (
              <li
                key={member.userId}
                className="flex flex-wrap items-center justify-between gap-x-4 gap-y-2 px-5 py-3 sm:px-6"
              >
                <div className="min-w-0">
                  <p className="font-medium">{member.name}</p>
                  <p className="text-small wrap-anywhere text-ink-2">{member.email}</p>
                </div>
                <div className="flex items-center gap-2">
                  <span className="text-small text-ink-2">{roleWords[member.role]}</span>
                  {mayRemove(member) && (
                    <Button
                      size="small"
                      aria-label={`Take off ${member.name}`}
                      onClick={() => {
                        setLeaving(member);
                      }}
                    >
                      Take off
                    </Button>
                  )}
                </div>
              </li>
            ))}
          </ul>
        )}
      </ListBody>
      {open.length > 0 && (
        <ul aria-label="Open invitations" className="divide-y divide-line border-t border-line">
          {open.map((invitation) => (
            <InvitationRow key={invitation.id} invitation={invitation} listKey={invitationsKey} />
          ))}
        </ul>
      )}
      {inviteForm !== undefined && (
        <div className="border-t border-line px-5 py-5 sm:px-6">{inviteForm}</div>
      )}
      <AlertDialog
        open={leaving !== undefined}
        onOpenChange={(stays) => {
          if (!stays) setLeaving(undefined);
        }}
        title={`Take off ${leaving?.name ?? ''}?`}
        description={removalWords}
        confirmWords="Take them off"
        cancelWords="Keep them"
        busy={removal.isPending}
        onConfirm={() => {
          if (leaving !== undefined) removal.mutate(leaving);
        }}
      />
    </Panel>
  );
}
