import type { SessionInformation } from '#shared/session/session-information.ts';
import { Field } from '../ui/field.tsx';
import { TextInput } from '../ui/text-input.tsx';

type SongFieldsProps = {
  information: SessionInformation;
  onChange: (change: Partial<SessionInformation>) => void;
};

/** Artist, title and tempo: they name the package and draw the bars. */
export function SongFields({ information, onChange }: SongFieldsProps) {
  const { artist, title, tempo } = information;
  return (
    <div className="grid gap-4 text-start sm:grid-cols-[1fr_1fr_8rem]">
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
      <Field label="Tempo, BPM">
        {(control) => (
          <TextInput
            {...control}
            inputMode="decimal"
            defaultValue={tempo?.kind === 'fixed' ? String(tempo.bpm) : ''}
            onChange={({ target }) => onChange({ tempo: tempoFrom(target.value) })}
          />
        )}
      </Field>
    </div>
  );
}

/** A tempo as typed, with a point or a comma; null while it is none. */
function tempoFrom(text: string): SessionInformation['tempo'] {
  const bpm = Number(text.trim().replace(',', '.'));
  return text.trim() !== '' && bpm >= 10 && bpm <= 999 ? { kind: 'fixed', bpm } : null;
}
