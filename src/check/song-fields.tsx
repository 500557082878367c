import type { SessionInformation } from '#shared/session/session-information.ts';
import { Field } from '../ui/field.tsx';
import { TextInput } from '../ui/text-input.tsx';
import { BpmField } from './tempo-field.tsx';

type SongFieldsProps = {
  information: SessionInformation;
  onChange: (change: Partial<SessionInformation>) => void;
};

/** Artist, title and tempo: they name the package and draw the bars. */
export function SongFields({ information, onChange }: SongFieldsProps) {
  return (
    <div className="grid gap-4 text-start sm:grid-cols-[1fr_8rem]">
      <NameFields information={information} onChange={onChange} />
      <BpmField
        label="Tempo, BPM"
        tempo={information.tempo}
        onChange={(tempo) => onChange({ tempo })}
      />
    </div>
  );
}

/** Whose song it is, and which. */
export function NameFields({ information, onChange }: SongFieldsProps) {
  const { artist, title } = information;
  return (
    <div className="grid gap-4 sm:grid-cols-2">
      <Field label="Artist">
        {(control) => (
          <TextInput
            {...control}
            maxLength={200}
            value={artist ?? ''}
            onChange={({ target }) => onChange({ artist: target.value || null })}
          />
        )}
      </Field>
      <Field label="Song">
        {(control) => (
          <TextInput
            {...control}
            maxLength={200}
            value={title ?? ''}
            onChange={({ target }) => onChange({ title: target.value || null })}
          />
        )}
      </Field>
    </div>
  );
}
