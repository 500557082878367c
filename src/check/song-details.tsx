import type { HouseRules } from '#shared/rules/house-rules.ts';
import type { SessionInformation } from '#shared/session/session-information.ts';
import { Button } from '../ui/button.tsx';
import { Checkbox } from '../ui/choice.tsx';
import { Field } from '../ui/field.tsx';
import { TextArea } from '../ui/text-input.tsx';
import { BarsFields } from './bars-fields.tsx';
import { ImportanceList } from './importance-list.tsx';
import { ReferenceLinks } from './reference-links.tsx';
import { NameFields } from './song-fields.tsx';
import { TempoField } from './tempo-field.tsx';

type SongDetailsProps = {
  information: SessionInformation;
  rules: HouseRules;
  /** Paths of the tracks, for the order of importance. */
  tracks: readonly string[];
  onChange: (change: Partial<SessionInformation>) => void;
  /** Clears what this browser remembers of the song. */
  onForget: () => void;
};

/** What no file can show: whose song it is, how fast, what matters, what was done before. */
export function SongDetails({ information, rules, tracks, onChange, onForget }: SongDetailsProps) {
  const { confirmations } = information;
  return (
    <div className="grid max-w-6xl gap-x-12 gap-y-7 lg:grid-cols-2">
      <div className="flex flex-col gap-6">
        <NameFields information={information} onChange={onChange} />
        <TempoField tempo={information.tempo} onChange={(tempo) => onChange({ tempo })} />
        <BarsFields information={information} onChange={onChange} />
        <Field
          label="Notes for the engineer"
          optional
          hint="Players, microphones, positions, what is on purpose."
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
      <div className="flex flex-col gap-6">
        {rules.confirm.length > 0 && (
          <fieldset>
            <legend className="mb-1 text-small font-medium">
              The engineer asks you to confirm
            </legend>
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
        <ImportanceList
          order={information.orderOfImportance ?? []}
          tracks={tracks}
          onChange={(orderOfImportance) => onChange({ orderOfImportance })}
        />
        <ReferenceLinks
          links={information.referenceLinks}
          onChange={(referenceLinks) => onChange({ referenceLinks })}
        />
        <p className="text-small text-ink-2">
          Names, answers and all of this are remembered for the song, in this browser only.{' '}
          <Button size="small" kind="quiet" onClick={onForget}>
            Forget this song
          </Button>
        </p>
      </div>
    </div>
  );
}
