import { useState } from 'react';
import { Button } from '../../ui/button.tsx';
import { AlertDialog, Dialog } from '../../ui/dialog.tsx';
import { Field } from '../../ui/field.tsx';
import { Menu, MenuItem, MenuSeparator } from '../../ui/menu.tsx';
import { Tabs } from '../../ui/tabs.tsx';
import { TextInput } from '../../ui/text-input.tsx';
import { toastDone, toastFailed } from '../../ui/toast.tsx';
import { Tooltip } from '../../ui/tooltip.tsx';

/** Everything that opens over or beside something. */
export function OverlaySamples() {
  const [dialogOpen, setDialogOpen] = useState(false);
  const [alertOpen, setAlertOpen] = useState(false);
  const [tab, setTab] = useState<'fix' | 'export' | 'know'>('fix');
  const say = (words: string) => () => {
    toastDone(words);
  };
  return (
    <div className="flex flex-col gap-6">
      <div className="flex flex-wrap gap-3">
        <Button
          onClick={() => {
            setDialogOpen(true);
          }}
        >
          Rename this file
        </Button>
        <Button
          kind="danger"
          onClick={() => {
            setAlertOpen(true);
          }}
        >
          Leave it out
        </Button>
        <Menu trigger={<Button>More</Button>} align="start">
          <MenuItem onSelect={say('Shown in the picture.')}>Show in the picture</MenuItem>
          <MenuItem onSelect={say('Copied.')}>Copy the name</MenuItem>
          <MenuItem disabled onSelect={say('')}>
            Listen (nothing is in this file)
          </MenuItem>
          <MenuSeparator />
          <MenuItem danger onSelect={say('Left out.')}>
            Leave it out
          </MenuItem>
        </Menu>
        <Tooltip words="Both sides carry the same sound, so one is enough.">
          <Button kind="quiet">Why one side?</Button>
        </Tooltip>
        <Button kind="quiet" onClick={say('Link copied.')}>
          Toast
        </Button>
        <Button
          kind="quiet"
          onClick={() => {
            toastFailed('The link could not be copied.');
          }}
        >
          Toast of a failure
        </Button>
      </div>
      <Tabs
        label="Findings by what to do"
        value={tab}
        onChange={setTab}
        tabs={[
          { value: 'fix', label: 'We can fix', count: 4, content: <p>Four repairs, all safe.</p> },
          { value: 'export', label: 'Export again', count: 2, content: <p>Two files.</p> },
          { value: 'know', label: 'Know', count: 7, content: <p>Nothing to do.</p> },
        ]}
      />
      <Dialog
        open={dialogOpen}
        onOpenChange={setDialogOpen}
        title="Rename this file"
        description="The file on your disk keeps its name; the one in the zip gets this."
        actions={
          <>
            <Button
              onClick={() => {
                setDialogOpen(false);
              }}
            >
              Keep the old name
            </Button>
            <Button
              kind="primary"
              onClick={() => {
                setDialogOpen(false);
              }}
            >
              Use this name
            </Button>
          </>
        }
      >
        <Field label="Name in the zip">
          {(control) => <TextInput {...control} defaultValue="V Lead Vocal" />}
        </Field>
      </Dialog>
      <AlertDialog
        open={alertOpen}
        onOpenChange={setAlertOpen}
        title="Leave “P Tambourine” out?"
        description="It will not be in the zip. You can take it in again until you save."
        confirmWords="Leave it out"
        onConfirm={() => {
          setAlertOpen(false);
        }}
      />
    </div>
  );
}
