import type { HouseRules } from '#shared/rules/house-rules.ts';
import type { ReactNode } from 'react';
import { TapeLabel } from '../../ui/tape-label.tsx';
import { bringRules, exportRules, type PlainRule } from './plain-rules.ts';
import { exampleName, patternWords } from './name-example.ts';

function Section({ title, lead, children }: { title: string; lead?: string; children: ReactNode }) {
  return (
    <section className="border-t-2 border-case pt-4">
      <h2 className="text-section">{title}</h2>
      {lead !== undefined && <p className="mt-1 text-ink-2">{lead}</p>}
      <div className="mt-4">{children}</div>
    </section>
  );
}

/** What, how, why: one rule a line. */
function Rules({ rules }: { rules: readonly PlainRule[] }) {
  return (
    <dl>
      {rules.map((rule) => (
        <div
          key={rule.what}
          className="grid gap-x-8 gap-y-0.5 border-b border-line py-3.5 first:border-t sm:grid-cols-[12rem_minmax(0,1fr)]"
        >
          <dt className="font-semibold">{rule.what}</dt>
          <dd>
            {rule.how}
            {rule.why !== undefined && <span className="block text-ink-2">{rule.why}</span>}
          </dd>
        </div>
      ))}
    </dl>
  );
}

/** Blank lines part paragraphs; the engineer's own words are shown as plain text. */
function Notes({ text }: { text: string }) {
  return (
    <div className="flex max-w-prose flex-col gap-3">
      {text
        .split(/\n\s*\n/)
        .filter((paragraph) => paragraph.trim() !== '')
        .map((paragraph, index) => (
          <p key={index} className="whitespace-pre-line">
            {paragraph.trim()}
          </p>
        ))}
    </div>
  );
}

/** One edition in the order of doing: before the export, the export, the names, what to bring. */
export function EditionText({ rules }: { rules: HouseRules }) {
  const { names, confirm, notes } = rules;
  return (
    <article className="flex min-w-0 flex-col gap-12">
      {confirm.length > 0 && (
        <Section
          title="Before the export"
          lead="No file can show these, so you are asked to tick them."
        >
          <ul className="flex max-w-prose flex-col gap-2.5">
            {confirm.map((item) => (
              <li key={item.id} className="grid grid-cols-[1.25rem_1fr] gap-x-3">
                <span
                  aria-hidden="true"
                  className="mt-1 size-4 rounded-slight border border-edge"
                />
                <span>{item.text}</span>
              </li>
            ))}
          </ul>
        </Section>
      )}
      <Section title="The export">
        <Rules rules={exportRules(rules)} />
      </Section>
      <Section title="Names" lead={patternWords(names)}>
        <div className="overflow-x-auto" role="region" aria-label="Names by group" tabIndex={0}>
          <table className="w-full text-left">
            <thead className="text-small text-ink-2">
              <tr className="border-b border-line">
                <th scope="col" className="py-2 pr-6 font-medium">
                  Group
                </th>
                {names.tokens.includes('group') && (
                  <th scope="col" className="py-2 pr-6 font-medium">
                    Written as
                  </th>
                )}
                <th scope="col" className="py-2 font-medium">
                  For example
                </th>
              </tr>
            </thead>
            <tbody>
              {names.groups.map((group, index) => (
                <tr key={group.id} className="border-b border-line">
                  <th scope="row" className="py-2 pr-6 font-normal">
                    {group.label}
                  </th>
                  {names.tokens.includes('group') && (
                    <td className="figures py-2 pr-6">
                      {names.groupStyle === 'letter' ? group.letter : group.label}
                    </td>
                  )}
                  <td className="py-2">
                    <TapeLabel name={exampleName(names, group, index + 1)} size="small" />
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        </div>
        <p className="mt-3 text-small text-ink-2">
          At most {names.maximumLength} characters
          {names.characters === 'portable'
            ? ', only plain letters, digits, spaces, dots, hyphens and underscores, so that every computer can read them.'
            : ', in any script.'}{' '}
          The check proposes a name for every file, so you need not rename anything by hand.
        </p>
      </Section>
      <Section title="What else to bring">
        <Rules rules={bringRules(rules)} />
      </Section>
      {notes.trim() !== '' && (
        <Section title="Also good to know">
          <Notes text={notes} />
        </Section>
      )}
    </article>
  );
}
