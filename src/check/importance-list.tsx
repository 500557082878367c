import { useState } from 'react';
import { Button } from '../ui/button.tsx';
import { Select } from '../ui/select.tsx';
import { TapeLabel } from '../ui/tape-label.tsx';
import { fileName } from './file-name.ts';

type ImportanceListProps = {
  /** Paths, the most important first. */
  order: readonly string[];
  /** Paths of the tracks there are. */
  tracks: readonly string[];
  onChange: (order: string[] | null) => void;
};

/** What matters most in the mix, in order: moved by buttons, or dragged. */
export function ImportanceList({ order: given, tracks, onChange }: ImportanceListProps) {
  const [dragged, setDragged] = useState<number | null>(null);
  const order = given.filter((path) => tracks.includes(path));
  const others = tracks.filter((path) => !order.includes(path));
  const change = (next: string[]): void => onChange(next.length > 0 ? next : null);
  const move = (from: number, to: number): void => {
    const next = [...order];
    next.splice(to, 0, ...next.splice(from, 1));
    change(next);
  };
  return (
    <fieldset>
      <legend className="text-small font-medium">What matters most</legend>
      <p className="mb-2 text-small text-ink-2">
        The parts a listener must not miss, the first one first. Two or three are enough.
      </p>
      <ol className="flex flex-col gap-1.5">
        {order.map((path, index) => (
          <li
            key={path}
            draggable
            onDragStart={(event) => {
              event.dataTransfer.effectAllowed = 'move';
              setDragged(index);
            }}
            onDragOver={(event) => {
              if (dragged !== null) event.preventDefault();
            }}
            onDrop={() => {
              if (dragged !== null) move(dragged, index);
              setDragged(null);
            }}
            onDragEnd={() => setDragged(null)}
            className="flex items-center gap-2"
          >
            <span className="figures w-6 text-end text-small text-ink-2">{index + 1}</span>
            <TapeLabel name={fileName(path)} size="small" className="min-w-0 shrink" />
            <span className="ms-auto flex">
              <Button
                size="small"
                kind="quiet"
                disabled={index === 0}
                aria-label={`${fileName(path)}: more important`}
                onClick={() => move(index, index - 1)}
              >
                ↑
              </Button>
              <Button
                size="small"
                kind="quiet"
                disabled={index === order.length - 1}
                aria-label={`${fileName(path)}: less important`}
                onClick={() => move(index, index + 1)}
              >
                ↓
              </Button>
              <Button
                size="small"
                kind="quiet"
                aria-label={`${fileName(path)}: take off the list`}
                onClick={() => change(order.filter((other) => other !== path))}
              >
                ✕
              </Button>
            </span>
          </li>
        ))}
      </ol>
      {others.length > 0 && (
        <div className="mt-2 max-w-72">
          <Select
            // A new list each time, because choosing adds and the list itself holds no choice.
            key={order.length}
            size="small"
            aria-label="Add a part to what matters most"
            placeholder="Add a part…"
            options={others.map((path) => ({ value: path, label: fileName(path) }))}
            value={undefined}
            onChange={(path) => change([...order, path])}
          />
        </div>
      )}
    </fieldset>
  );
}
