import type { SessionInformation } from '#shared/session/session-information.ts';
import { Button } from '../ui/button.tsx';
import { TextInput } from '../ui/text-input.tsx';

type Links = SessionInformation['referenceLinks'];

/** Songs the mix may be held against: where to hear them, which moment, what to listen for. */
export function ReferenceLinks({
  links,
  onChange,
}: {
  links: Links;
  onChange: (links: Links) => void;
}) {
  const set = (index: number, change: Partial<Links[number]>): void =>
    onChange(links.with(index, { ...links[index]!, ...change }));
  return (
    <fieldset>
      <legend className="text-small font-medium">References</legend>
      <p className="mb-2 text-small text-ink-2">
        A link here, or a file in the folder that you mark as a reference in the packing list. Send
        only what you may share, for private listening.
      </p>
      <ul className="flex flex-col gap-3">
        {links.map((link, index) => {
          const number = String(index + 1);
          return (
            <li key={index} className="grid gap-2 sm:grid-cols-[1fr_7rem]">
              <TextInput
                type="url"
                aria-label={`Link of reference ${number}`}
                placeholder="Link"
                maxLength={2000}
                value={link.url}
                onChange={({ target }) => set(index, { url: target.value })}
              />
              <TextInput
                aria-label={`Moment of reference ${number}`}
                placeholder="at 1:20"
                maxLength={100}
                value={link.moment}
                onChange={({ target }) => set(index, { moment: target.value })}
              />
              <TextInput
                aria-label={`What to listen for in reference ${number}`}
                placeholder="What to listen for"
                maxLength={500}
                value={link.listenFor}
                onChange={({ target }) => set(index, { listenFor: target.value })}
              />
              <Button
                kind="quiet"
                aria-label={`Remove reference ${number}`}
                onClick={() => onChange(links.filter((_, other) => other !== index))}
              >
                Remove
              </Button>
            </li>
          );
        })}
      </ul>
      <Button
        size="small"
        className="mt-2"
        onClick={() => onChange([...links, { url: '', moment: '', listenFor: '' }])}
      >
        Add a link
      </Button>
    </fieldset>
  );
}
