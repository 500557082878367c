import { useQueryClient } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { editionQuery } from '../routes/rules/rules.tsx';
import { errorText } from '../app/error-text.ts';
import { Button } from '../ui/button.tsx';
import { Dialog } from '../ui/dialog.tsx';
import { Field } from '../ui/field.tsx';
import { TextInput } from '../ui/text-input.tsx';
import { checkRulesWords, editionFromLink, readRulesFile, type CheckRules } from './check-rules.ts';
import { RulesMistakes } from './rules-mistakes.tsx';

type OtherRulesProps = {
  current: CheckRules;
  /** Rules from a file; null goes back to those of the page's address. */
  onRules: (rules: CheckRules | null) => void;
};

/** What the folder is checked against, and a way to choose something else. */
export function OtherRules({ current, onRules }: OtherRulesProps) {
  const [open, setOpen] = useState(false);
  return (
    <span>
      Against {checkRulesWords(current)}.{' '}
      <button type="button" className="text-link py-1" onClick={() => setOpen(true)}>
        Other rules
      </button>
      <Dialog
        open={open}
        onOpenChange={setOpen}
        title="Other rules"
        description="What is measured already stays measured; only the findings change."
      >
        <RulesChoices
          current={current}
          onRules={(rules) => {
            setOpen(false);
            onRules(rules);
          }}
        />
      </Dialog>
    </span>
  );
}

function RulesChoices({ current, onRules }: OtherRulesProps) {
  const queries = useQueryClient();
  const navigate = useNavigate();
  const file = useRef<HTMLInputElement>(null);
  const [link, setLink] = useState('');
  const [linkError, setLinkError] = useState<string>();
  const [failure, setFailure] = useState<unknown>(null);

  const openLink = async (): Promise<void> => {
    const wanted = editionFromLink(link);
    if (!wanted) {
      setLinkError('This is no link to house rules. It ends like /rules/studio-name/2.');
      return;
    }
    try {
      const found = await queries.fetchQuery(editionQuery(wanted.slug, wanted.number));
      await navigate(`/check?rules=${found.studio.slug}/${String(found.number)}`);
      onRules(null);
    } catch (error) {
      const { title, advice } = errorText(error);
      setLinkError(`${title} ${advice}`);
    }
  };

  return (
    <div className="flex flex-col gap-6">
      <form
        noValidate
        onSubmit={(event) => {
          event.preventDefault();
          void openLink();
        }}
      >
        <Field label="Link to an engineer’s house rules" error={linkError}>
          {(control) => (
            <div className="flex gap-2">
              <TextInput
                {...control}
                inputMode="url"
                autoComplete="off"
                value={link}
                onChange={({ target }) => {
                  setLink(target.value);
                  setLinkError(undefined);
                }}
              />
              <Button type="submit">Use them</Button>
            </div>
          )}
        </Field>
      </form>
      <div>
        <p className="mb-1.5 text-small font-medium">Or house rules in a file</p>
        <Button onClick={() => file.current?.click()}>Choose a JSON file</Button>
        <input
          ref={file}
          type="file"
          hidden
          accept=".json,application/json"
          aria-label="House rules file"
          onChange={({ currentTarget }) => {
            const chosen = currentTarget.files?.[0];
            setFailure(null);
            if (chosen) readRulesFile(chosen).then(onRules, setFailure);
            currentTarget.value = '';
          }}
        />
        {failure !== null && (
          <div className="mt-3">
            <RulesMistakes failure={failure} />
          </div>
        )}
      </div>
      {(current.edition !== null || current.fileName !== null) && (
        <p className="border-t border-line pt-4">
          <Button
            onClick={() => {
              void navigate('/check');
              onRules(null);
            }}
          >
            Back to the default rules
          </Button>
        </p>
      )}
    </div>
  );
}
