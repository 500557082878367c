import type { Project } from '#shared/api/projects.ts';
import { Link } from 'react-router-dom';
import { dayWords } from '../../app/moments.ts';
import { roleInSentence } from '../people/role-words.ts';

type ProjectRowsProps = {
  projects: readonly Project[];
  /** Say whose studio it is, where the list holds several. */
  withStudio?: boolean;
};

/** Projects as lines: artist and title, since when, under which edition. */
export function ProjectRows({ projects, withStudio = false }: ProjectRowsProps) {
  return (
    <ul className="divide-y divide-line">
      {projects.map((project) => (
        <li
          key={project.id}
          className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 px-5 py-4 sm:px-6"
        >
          <div className="min-w-0">
            <Link to={`/projects/${project.id}`} className="text-link font-medium">
              {project.title}
            </Link>
            {project.artistName !== null && (
              <p className="text-small text-ink-2">
                {project.artistName}
                {withStudio && project.studio !== null && ` · ${project.studio.name}`}
              </p>
            )}
          </div>
          <p className="text-small text-ink-2">
            {project.rulesEditionNumber !== null &&
              `rules edition ${String(project.rulesEditionNumber)} · `}
            {withStudio && `you are ${roleInSentence[project.role]} · `}
            since {dayWords(project.createdAt)}
          </p>
        </li>
      ))}
    </ul>
  );
}
