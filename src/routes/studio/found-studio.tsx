import { foundStudio } from '#shared/api/studios.ts';
import { useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { lineWords, slugWords } from '../../app/field-words.ts';
import { alreadyTaken, Form, useBodyForm } from '../../app/form.tsx';
import { usePageTitle } from '../../app/page-title.ts';
import { sessionQuery } from '../../app/session-query.ts';
import { Page } from '../../app/shell.tsx';
import { Field } from '../../ui/field.tsx';
import { PageHeader } from '../../ui/page-header.tsx';
import { TextInput } from '../../ui/text-input.tsx';
import { slugFrom } from './slug-from.ts';

/** `/found-studio`: name and web address of a studio; whoever founds it owns it. */
export function FoundStudioPage() {
  usePageTitle('Found a studio');
  const client = useQueryClient();
  const navigate = useNavigate();
  const form = useBodyForm({
    schema: foundStudio.body,
    defaults: { name: '', slug: '' },
    words: { name: lineWords('the studio’s name', 80), slug: slugWords },
    submit: async (body) => {
      const studio = await call(foundStudio, { body });
      await client.invalidateQueries({ queryKey: sessionQuery.queryKey });
      await navigate(`/studio/${studio.slug}`);
    },
    refusedField: alreadyTaken('slug'),
  });
  const slugTouched = form.formState.dirtyFields.slug === true;
  const nameField = form.register('name', {
    onChange: (event: React.ChangeEvent<HTMLInputElement>) => {
      if (!slugTouched) form.setValue('slug', slugFrom(event.target.value));
    },
  });
  return (
    <Page narrow>
      <PageHeader
        title="Found a studio"
        meta="A studio publishes house rules, opens projects for artists and receives their files. You own it; assistants are invited later."
      />
      <div className="rounded-panel border border-line bg-sheet p-5 sm:p-7">
        <Form form={form} submitWords="Found the studio" busyWords="Founding…">
          <Field label="Name of the studio" error={form.mistake('name')}>
            {(control) => <TextInput {...control} {...nameField} autoComplete="organization" />}
          </Field>
          <Field
            label="Web address"
            hint="What artists type to read your house rules. It cannot be changed later."
            error={form.mistake('slug')}
          >
            {(control) => (
              <div className="flex items-center rounded border border-edge bg-sheet focus-within:outline-2 focus-within:outline-offset-2 focus-within:outline-case">
                <span className="figures shrink-0 pl-3 text-small text-ink-2">/rules/</span>
                <TextInput
                  {...control}
                  {...form.register('slug')}
                  autoCapitalize="none"
                  autoComplete="off"
                  spellCheck={false}
                  className="figures border-0 bg-transparent pl-0.5 focus-visible:outline-none"
                />
              </div>
            )}
          </Field>
        </Form>
      </div>
    </Page>
  );
}
