import { createProject, listMyProjects } from '#shared/api/projects.ts';
import type { Studio } from '#shared/api/studios.ts';
import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { lineWords } from '../../app/field-words.ts';
import { Form, useBodyForm } from '../../app/form.tsx';
import { ListBody, usePagedList } from '../../app/paged-list.tsx';
import { Button } from '../../ui/button.tsx';
import { Dialog } from '../../ui/dialog.tsx';
import { Field } from '../../ui/field.tsx';
import { Panel } from '../../ui/panel.tsx';
import { EmptyState } from '../../ui/states.tsx';
import { TextInput } from '../../ui/text-input.tsx';
import { ProjectRows } from '../project/project-rows.tsx';

function OpenProject({ studioId, onClose }: { studioId: string; onClose: () => void }) {
  const client = useQueryClient();
  const navigate = useNavigate();
  const form = useBodyForm({
    schema: createProject.body,
    defaults: { title: '', artistName: '' },
    words: {
      title: lineWords('what the project is called', 120),
      artistName: lineWords('the artist’s name', 120),
    },
    submit: async (body) => {
      const project = await call(createProject, { params: { studioId }, body });
      await client.invalidateQueries({ queryKey: ['projects'] });
      onClose();
      await navigate(`/projects/${project.id}`);
    },
  });
  return (
    <Form
      form={form}
      submitWords="Open the project"
      busyWords="Opening…"
      aside={<Button onClick={onClose}>Not now</Button>}
    >
      <Field label="Artist" error={form.mistake('artistName')}>
        {(control) => (
          <TextInput {...control} {...form.register('artistName')} placeholder="Velvet Tramline" />
        )}
      </Field>
      <Field
        label="Project"
        hint="The record, the EP, or the song if there is only one."
        error={form.mistake('title')}
      >
        {(control) => (
          <TextInput {...control} {...form.register('title')} placeholder="Weather for Two" />
        )}
      </Field>
    </Form>
  );
}

/** The projects of this studio that the person may see; the owner can open one. */
export function StudioProjects({ studio }: { studio: Studio }) {
  const [opening, setOpening] = useState(false);
  const projects = usePagedList(['projects'], (query, signal) =>
    call(listMyProjects, { query }, signal),
  );
  const owns = studio.role === 'owner';
  const openButton = (
    <Button
      kind="primary"
      size="small"
      onClick={() => {
        setOpening(true);
      }}
    >
      Open a project
    </Button>
  );
  const empty = (
    <EmptyState title="No projects yet." action={owns && openButton}>
      {owns
        ? 'A project holds an artist’s songs and is held to the edition of your rules that is newest when you open it.'
        : 'The owner puts assistants on projects; yours will be listed here.'}
    </EmptyState>
  );
  return (
    <Panel title="Projects" flush actions={owns && openButton}>
      <ListBody list={projects} words="Loading projects…" empty={empty}>
        {(items) => {
          const here = items.filter((project) => project.studio?.id === studio.id);
          return here.length === 0 && !projects.hasNextPage ? (
            empty
          ) : (
            <ProjectRows projects={here} />
          );
        }}
      </ListBody>
      <Dialog
        open={opening}
        onOpenChange={setOpening}
        title="Open a project"
        description="The artist is invited on the next page."
      >
        <OpenProject
          studioId={studio.id}
          onClose={() => {
            setOpening(false);
          }}
        />
      </Dialog>
    </Panel>
  );
}
