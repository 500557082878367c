import { useState } from 'react';
import type { SessionInformation, Tempo } from '#shared/session/session-information.ts';
import { Button } from '../ui/button.tsx';
import { RadioGroup } from '../ui/choice.tsx';
import { Field } from '../ui/field.tsx';
import { TextInput } from '../ui/text-input.tsx';

type TempoFieldProps = {
  tempo: SessionInformation['tempo'];
  onChange: (tempo: SessionInformation['tempo']) => void;
};

type Kind = 'fixed' | 'changes' | 'no-click';

const kinds: { value: Kind; label: string }[] = [
  { value: 'fixed', label: 'One tempo' },
  { value: 'changes', label: 'It changes' },
  { value: 'no-click', label: 'Played without a click' },
];

/** One tempo, a list of changes, or none: each is a full answer. */
export function TempoField({ tempo, onChange }: TempoFieldProps) {
  const [kind, setKind] = useState<Kind>(
    tempo === null || tempo.kind === 'map' ? 'fixed' : tempo.kind,
  );
  return (
    <div className="flex flex-col gap-3">
      <RadioGroup
        legend="Tempo"
        options={kinds}
        value={kind}
        onChange={(chosen) => {
          setKind(chosen);
          onChange(startOf(chosen, tempo));
        }}
      />
      {kind === 'fixed' && <BpmField tempo={tempo} onChange={onChange} label="Beats a minute" />}
      {kind === 'changes' && tempo?.kind === 'changes' && (
        <TempoChanges changes={tempo.changes} onChange={onChange} />
      )}
    </div>
  );
}

/** A single tempo as it is typed. */
export function BpmField({ tempo, onChange, label }: TempoFieldProps & { label: string }) {
  return (
    <Field label={label} className="max-w-32">
      {(control) => (
        <TextInput
          {...control}
          inputMode="decimal"
          defaultValue={tempo?.kind === 'fixed' ? String(tempo.bpm) : ''}
          onChange={({ target }) => {
            const bpm = bpmFrom(target.value);
            onChange(bpm === null ? null : { kind: 'fixed', bpm });
          }}
        />
      )}
    </Field>
  );
}

type Changes = Extract<Tempo, { kind: 'changes' }>['changes'];

function TempoChanges({
  changes,
  onChange,
}: {
  changes: Changes;
  onChange: TempoFieldProps['onChange'];
}) {
  const replace = (next: Changes): void => onChange({ kind: 'changes', changes: next });
  const last = changes.at(-1)!;
  return (
    <div>
      <ul className="flex flex-col gap-2">
        {changes.map(({ bar, bpm }, index) => (
          <li key={index} className="flex flex-wrap items-center gap-2 text-small">
            From bar
            <TextInput
              className="max-w-20 py-1"
              inputMode="numeric"
              aria-label={`Bar of tempo ${String(index + 1)}`}
              defaultValue={String(bar)}
              onChange={({ target }) => {
                const typed = Number(target.value);
                if (target.value.trim() !== '' && Number.isInteger(typed))
                  replace(changes.with(index, { bar: typed, bpm }));
              }}
            />
            at
            <TextInput
              className="max-w-24 py-1"
              inputMode="decimal"
              aria-label={`Beats a minute of tempo ${String(index + 1)}`}
              defaultValue={String(bpm)}
              onChange={({ target }) => {
                const typed = bpmFrom(target.value);
                if (typed !== null) replace(changes.with(index, { bar, bpm: typed }));
              }}
            />
            BPM
            {index === changes.length - 1 && index > 0 && (
              <Button size="small" kind="quiet" onClick={() => replace(changes.slice(0, -1))}>
                Remove
              </Button>
            )}
          </li>
        ))}
      </ul>
      <Button
        size="small"
        className="mt-2"
        onClick={() => replace([...changes, { bar: last.bar + 8, bpm: last.bpm }])}
      >
        Add a change
      </Button>
    </div>
  );
}

function startOf(kind: Kind, before: SessionInformation['tempo']): SessionInformation['tempo'] {
  if (before?.kind === kind) return before;
  if (kind === 'no-click') return { kind };
  const bpm =
    before?.kind === 'fixed'
      ? before.bpm
      : before?.kind === 'changes'
        ? before.changes[0]!.bpm
        : null;
  if (kind === 'changes') return { kind, changes: [{ bar: 1, bpm: bpm ?? 120 }] };
  return bpm === null ? null : { kind, bpm };
}

/** A tempo as typed, with a point or a comma; null while it is none. */
function bpmFrom(text: string): number | null {
  const bpm = Number(text.trim().replace(',', '.'));
  return text.trim() !== '' && bpm >= 10 && bpm <= 999 ? bpm : null;
}
