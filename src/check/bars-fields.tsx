import type { SessionInformation } from '#shared/session/session-information.ts';
import { Field } from '../ui/field.tsx';
import { Select } from '../ui/select.tsx';
import { TextInput } from '../ui/text-input.tsx';

type BarsFieldsProps = {
  information: SessionInformation;
  onChange: (change: Partial<SessionInformation>) => void;
};

type Unit = SessionInformation['metre']['unit'];
const units: { value: `${Unit}`; label: string }[] = [
  { value: '2', label: 'half note' },
  { value: '4', label: 'quarter' },
  { value: '8', label: 'eighth' },
  { value: '16', label: 'sixteenth' },
];

/** How bars are counted: metre, the number of the first one, count-in. */
export function BarsFields({ information, onChange }: BarsFieldsProps) {
  const { metre, startBar, countInBars } = information;
  return (
    <div className="grid grid-cols-2 items-end gap-4 sm:grid-cols-4">
      <WholeNumber
        label="Beats in a bar"
        value={metre.beats}
        from={1}
        to={32}
        onChange={(beats) => onChange({ metre: { ...metre, beats } })}
      />
      <Field label="A beat is a">
        {(control) => (
          <Select
            {...control}
            options={units}
            value={`${metre.unit}`}
            onChange={(unit) => onChange({ metre: { ...metre, unit: Number(unit) as Unit } })}
          />
        )}
      </Field>
      <WholeNumber
        label="Files begin at bar"
        value={startBar}
        from={-999}
        to={9999}
        onChange={(bar) => onChange({ startBar: bar })}
      />
      <WholeNumber
        label="Bars of count-in"
        value={countInBars}
        from={0}
        to={64}
        onChange={(bars) => onChange({ countInBars: bars })}
      />
    </div>
  );
}

function WholeNumber({
  label,
  value,
  from,
  to,
  onChange,
}: {
  label: string;
  value: number;
  from: number;
  to: number;
  onChange: (value: number) => void;
}) {
  return (
    <Field label={label}>
      {(control) => (
        <TextInput
          {...control}
          inputMode="numeric"
          defaultValue={String(value)}
          onChange={({ target }) => {
            const typed = Number(target.value);
            const isNumber = target.value.trim() !== '' && Number.isInteger(typed);
            if (isNumber && typed >= from && typed <= to) onChange(typed);
          }}
        />
      )}
    </Field>
  );
}
