import { listEditions } from '#shared/api/rules.ts';
import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { call } from '../../app/api-client.ts';
import { dayWords } from '../../app/moments.ts';

/** Every edition there is, with the shown one marked. Says nothing where it cannot be loaded. */
export function OtherEditions({ slug, shown }: { slug: string; shown: number }) {
  const editions = useQuery({
    queryKey: ['editions', slug, 'list'],
    queryFn: ({ signal }) =>
      call(listEditions, { params: { slug }, query: { limit: 100 } }, signal),
  });
  const items = editions.data?.items ?? [];
  if (items.length === 0) return null;
  return (
    <>
      <h2 className="font-semibold">Editions</h2>
      <ol className="mt-2 border-t border-line">
        {items.map((edition) => (
          <li key={edition.number} className="border-b border-line py-2">
            {edition.number === shown ? (
              <span className="font-medium" aria-current="page">
                Edition {edition.number}, shown here
              </span>
            ) : (
              <Link to={`/rules/${slug}/${String(edition.number)}`} className="text-link">
                Edition {edition.number}
              </Link>
            )}
            <span className="block text-ink-2">{dayWords(edition.publishedAt)}</span>
          </li>
        ))}
      </ol>
    </>
  );
}
