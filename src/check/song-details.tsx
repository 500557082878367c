import type { HouseRules } from '#shared/rules/house-rules.ts';
import type { SessionInformation } from '#shared/session/session-information.ts';
import { Checkbox } from '../ui/choice.tsx';
import { Field } from '../ui/field.tsx';
import { TextArea } from '../ui/text-input.tsx';
import { SongFields } from './song-fields.tsx';

type SongDetailsProps = {
  information: SessionInformation;
  rules: HouseRules;
  onChange: (change: Partial<SessionInformation>) => void;
};

/** What no file can show: whose song it is, how fast, what was done before the export. */
export function SongDetails({ information, rules, onChange }: SongDetailsProps) {
  const { confirmations } = information;
  return (
    <div className="grid max-w-5xl gap-x-10 gap-y-6 lg:grid-cols-2">
      <div className="flex flex-col gap-5">
        <SongFields information={information} onChange={onChange} />
        <Field
          label="Notes for the engineer"
          optional
          hint="Players, microphones, what matters most, what is on purpose."
        >
          {(control) => (
            <TextArea
              {...control}
              maxLength={20_000}
              value={information.notes ?? ''}
              onChange={({ target }) => onChange({ notes: target.value || null })}
            />
          )}
        </Field>
      </div>
      {rules.confirm.length > 0 && (
        <fieldset>
          <legend className="mb-1 text-small font-medium">The engineer asks you to confirm</legend>
          {rules.confirm.map(({ id, text }) => (
            <Checkbox
              key={id}
              label={text}
              checked={confirmations.includes(id)}
              onChange={({ target }) =>
                onChange({
                  confirmations: target.checked
                    ? [...confirmations, id]
                    : confirmations.filter((ticked) => ticked !== id),
                })
              }
            />
          ))}
        </fieldset>
      )}
    </div>
  );
}
