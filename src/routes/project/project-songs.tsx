import { createSong, listSongs, type Project } from '#shared/api/projects.ts';
import { useQueryClient } from '@tanstack/react-query';
import { call } from '../../app/api-client.ts';
import { lineWords } from '../../app/field-words.ts';
import { Form, useBodyForm } from '../../app/form.tsx';
import { ListBody, usePagedList } from '../../app/paged-list.tsx';
import { Field } from '../../ui/field.tsx';
import { Panel } from '../../ui/panel.tsx';
import { EmptyState } from '../../ui/states.tsx';
import { TextInput } from '../../ui/text-input.tsx';
import { SongRow } from './song-row.tsx';

/** Adding a song is one line, so it is not hidden behind a dialog. */
function AddSong({ projectId }: { projectId: string }) {
  const client = useQueryClient();
  const form = useBodyForm({
    schema: createSong.body,
    defaults: { title: '' },
    words: { title: lineWords('what the song is called', 120) },
    submit: async (body) => {
      await call(createSong, { params: { projectId }, body });
      form.reset();
      await client.invalidateQueries({ queryKey: ['projects', projectId, 'songs'] });
    },
  });
  return (
    <Form form={form} submitWords="Add it" busyWords="Adding…" submitKind="plain" inLine>
      <Field label="Add a song" error={form.mistake('title')}>
        {(control) => <TextInput {...control} {...form.register('title')} autoComplete="off" />}
      </Field>
    </Form>
  );
}

type ProjectSongsProps = {
  project: Pick<Project, 'id' | 'role'>;
  title?: string;
  /** What an empty list says. */
  emptyTitle?: string;
};

/** The songs of a project, each with its reports. */
export function ProjectSongs({
  project,
  title = 'Songs',
  emptyTitle = 'No songs yet.',
}: ProjectSongsProps) {
  const songs = usePagedList(['projects', project.id, 'songs'], (query, signal) =>
    call(listSongs, { params: { projectId: project.id }, query }, signal),
  );
  return (
    <Panel title={title} flush>
      <ListBody
        list={songs}
        words="Loading songs…"
        empty={
          <EmptyState title={emptyTitle}>
            A song holds the reports of its checks, so that you see what is new, mended or still
            there.
          </EmptyState>
        }
      >
        {(items) => (
          <ul className="divide-y divide-line">
            {items.map((song) => (
              <SongRow key={song.id} song={song} />
            ))}
          </ul>
        )}
      </ListBody>
      {project.role !== 'assistant' && (
        <div className="border-t border-line px-5 py-5 sm:px-6">
          <AddSong projectId={project.id} />
        </div>
      )}
    </Panel>
  );
}
