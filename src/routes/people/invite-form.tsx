import { emailSchema } from '#shared/api/fields.ts';
import type { InvitedRole } from '#shared/api/invitations.ts';
import { useQueryClient, type QueryKey } from '@tanstack/react-query';
import { useState } from 'react';
import { z } from 'zod';
import { emailWords } from '../../app/field-words.ts';
import { Form, useBodyForm } from '../../app/form.tsx';
import { RadioGroup } from '../../ui/choice.tsx';
import { Field } from '../../ui/field.tsx';
import { TextInput } from '../../ui/text-input.tsx';
import { toastDone } from '../../ui/toast.tsx';

const inviteSchema = z.strictObject({ email: emailSchema });

const roleOptions: Record<InvitedRole, { label: string; hint: string }> = {
  assistant: { label: 'Assistant', hint: 'Prepares sessions and reviews deliveries.' },
  artist: { label: 'Artist', hint: 'Accepts the agreement, prepares and delivers the songs.' },
  bandmate: { label: 'Bandmate', hint: 'Prepares and delivers songs, accepts nothing.' },
};

type InviteFormProps<Role extends InvitedRole> = {
  label: string;
  /** What may be invited here; a choice is shown where there is one. */
  roles: readonly [Role, ...Role[]];
  /** The list of open invitations, read again afterwards. */
  invitationsKey: QueryKey;
  invite: (email: string, role: Role) => Promise<unknown>;
};

/** One address, one mail with a link. A second invitation to an address replaces the first. */
export function InviteForm<Role extends InvitedRole>({
  label,
  roles,
  invitationsKey,
  invite,
}: InviteFormProps<Role>) {
  const client = useQueryClient();
  const [role, setRole] = useState<Role>(roles[0]);
  const form = useBodyForm({
    schema: inviteSchema,
    defaults: { email: '' },
    words: { email: emailWords },
    submit: async ({ email }) => {
      await invite(email, role);
      form.reset();
      toastDone(`An invitation is on its way to ${email}.`);
      await client.invalidateQueries({ queryKey: invitationsKey });
    },
  });
  return (
    <Form form={form} submitWords="Send the invitation" busyWords="Sending…" submitKind="plain">
      <Field label={label} error={form.mistake('email')}>
        {(control) => (
          <TextInput
            {...control}
            {...form.register('email')}
            type="email"
            inputMode="email"
            autoComplete="off"
            placeholder="Their e-mail address"
          />
        )}
      </Field>
      {roles.length > 1 && (
        <RadioGroup
          legend="They come as"
          value={role}
          onChange={setRole}
          options={roles.map((value) => ({ value, ...roleOptions[value] }))}
        />
      )}
    </Form>
  );
}
