import { useState } from 'react';
import { Button, ButtonLink, type ButtonKind } from '../../ui/button.tsx';
import { Checkbox, RadioGroup } from '../../ui/choice.tsx';
import { Field } from '../../ui/field.tsx';
import { Progress } from '../../ui/progress.tsx';
import { Select } from '../../ui/select.tsx';
import { PasswordInput, TextArea, TextInput } from '../../ui/text-input.tsx';

const kinds: readonly { kind: ButtonKind; words: string }[] = [
  { kind: 'primary', words: 'Fix these 4 for me' },
  { kind: 'plain', words: 'I exported again' },
  { kind: 'quiet', words: 'Why?' },
  { kind: 'danger', words: 'Leave it out' },
];

type Room = 'dry' | 'wet' | 'both';

/** Buttons and fields in each of their states. */
export function ControlSamples() {
  const [rate, setRate] = useState<'44100' | '48000' | '96000'>();
  const [room, setRoom] = useState<Room>('both');
  return (
    <div className="flex flex-col gap-7">
      <div className="flex flex-wrap items-center gap-3">
        {kinds.map(({ kind, words }) => (
          <Button key={kind} kind={kind}>
            {words}
          </Button>
        ))}
        <ButtonLink to="/check">Check a folder</ButtonLink>
      </div>
      <div className="flex flex-wrap items-center gap-3">
        <Button size="small">Small</Button>
        <Button size="large" kind="primary">
          Large
        </Button>
        <Button kind="primary" busy busyWords="Saving…">
          Save the zip
        </Button>
        <Button disabled>Not now</Button>
      </div>
      <div className="grid max-w-3xl items-start gap-6 sm:grid-cols-2">
        <Field label="Song" hint="As it should be called in the folder.">
          {(control) => <TextInput {...control} defaultValue="Salt on the Windows" />}
        </Field>
        <Field label="Tempo" error="Write a number between 20 and 400, or “no click”.">
          {(control) => <TextInput {...control} defaultValue="fast" />}
        </Field>
        <Field label="Password">
          {(control) => (
            <PasswordInput {...control} defaultValue="paper boats" autoComplete="off" />
          )}
        </Field>
        <Field label="Sample rate" optional>
          {(control) => (
            <Select
              {...control}
              value={rate}
              onChange={setRate}
              options={[
                { value: '44100', label: '44.1 kHz' },
                { value: '48000', label: '48 kHz', hint: 'what most sessions use' },
                { value: '96000', label: '96 kHz' },
              ]}
            />
          )}
        </Field>
        <Field label="Notes" className="sm:col-span-2">
          {(control) => <TextArea {...control} placeholder="Who played what, where?" />}
        </Field>
        <div>
          <Checkbox label="Editing and tuning are finished." defaultChecked />
          <Checkbox
            label="The arrangement is final."
            hint="No more parts will come."
            error="Tick this, or say what is still to come."
          />
        </div>
        <RadioGroup
          legend="Send the guitars"
          value={room}
          onChange={setRoom}
          options={[
            { value: 'dry', label: 'clean' },
            { value: 'wet', label: 'with the amp' },
            { value: 'both', label: 'both', hint: 'The clean signal beside the amp.' },
          ]}
        />
      </div>
      <div className="max-w-md">
        <Progress label="Reading the files" value={0.35}>
          14 of 40 files, 12 s left
        </Progress>
      </div>
    </div>
  );
}
