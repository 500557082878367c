import { queryOptions } from '@tanstack/react-query';
import { getProject } from '#shared/api/projects.ts';
import { getEdition, type Edition } from '#shared/api/rules.ts';
import { call } from '../app/api-client.ts';

/** The edition a project is held to; null for private projects and studios without rules. */
export function projectRulesQuery(projectId: string) {
  return queryOptions({
    queryKey: ['projects', projectId, 'rules'],
    queryFn: async ({ signal }): Promise<Edition | null> => {
      const project = await call(getProject, { params: { projectId } }, signal);
      if (!project.studio || project.rulesEditionNumber === null) return null;
      const params = { slug: project.studio.slug, number: project.rulesEditionNumber };
      return call(getEdition, { params }, signal);
    },
    throwOnError: true,
  });
}
