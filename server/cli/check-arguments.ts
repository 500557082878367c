import { parseArgs } from 'node:util';

export const usage = `Checks a folder (or zip) of exported tracks before it is sent to be mixed.

  npm run -s check -- <folder or zip> [options]

  --rules <file.json>     house rules to check against (else common ones)
  --artist <name>         for the package's name and the track sheet
  --title <song>
  --tempo <BPM|none>      one number, or "none" for a song without a click
  --rough-mix <file>      the file that is the rough mix; its path in the folder,
                          or any path to a file
  --repair safe           make the repairs that cannot change how anything sounds
  --out <file.zip>        write the package; the files themselves are never touched
  --json                  print the report, and nothing else, to standard output
  --schema                print the JSON Schema of the report
  --help

Exit codes: 0 nothing must be fixed, 1 something must be fixed (after repairs,
where asked), 2 the check could not run.
`;

export type CheckArguments = {
  target: string;
  rules: string | null;
  artist: string | null;
  title: string | null;
  tempo: number | 'none' | null;
  roughMix: string | null;
  repairSafe: boolean;
  out: string | null;
  json: boolean;
};

/** Something about the command itself that cannot be understood; one sentence. */
export class ArgumentProblem extends Error {}

/** Or what was asked for instead of a check. Throws ArgumentProblem. */
export function parseCheckArguments(args: readonly string[]): CheckArguments | 'help' | 'schema' {
  const { values, positionals } = parse(args);
  if (values.help) return 'help';
  if (values.schema) return 'schema';
  const [target, ...more] = positionals;
  if (target === undefined) throw new ArgumentProblem('Name the folder or zip to check.');
  if (more.length > 0) {
    throw new ArgumentProblem(
      `One folder or zip at a time; "${more[0]}" is one too many. Put names with spaces in quotes.`,
    );
  }
  if (values.repair !== undefined && values.repair !== 'safe') {
    throw new ArgumentProblem('--repair takes "safe" and nothing else.');
  }
  return {
    target,
    rules: values.rules ?? null,
    artist: words('--artist', values.artist),
    title: words('--title', values.title),
    tempo: tempo(values.tempo),
    roughMix: values['rough-mix'] ?? null,
    repairSafe: values.repair === 'safe',
    out: values.out ?? null,
    json: values.json ?? false,
  };
}

function parse(args: readonly string[]) {
  try {
    return parseArgs({
      args: [...args],
      allowPositionals: true,
      options: {
        rules: { type: 'string' },
        artist: { type: 'string' },
        title: { type: 'string' },
        tempo: { type: 'string' },
        'rough-mix': { type: 'string' },
        repair: { type: 'string' },
        out: { type: 'string' },
        json: { type: 'boolean' },
        schema: { type: 'boolean' },
        help: { type: 'boolean', short: 'h' },
      },
    });
  } catch (error) {
    const said = error instanceof Error ? error.message : String(error);
    const option = /'(-[^' ]+)/.exec(said)?.[1];
    if (option === undefined) throw error;
    throw new ArgumentProblem(
      said.includes('argument missing')
        ? `${option} needs a value.`
        : `${option} is not an option here. --help lists them.`,
    );
  }
}

/** The session information takes at most this many characters. */
const longestWords = 200;

function words(option: string, value: string | undefined): string | null {
  const trimmed = value?.trim() ?? '';
  if (trimmed.length > longestWords) {
    throw new ArgumentProblem(`${option} takes at most ${longestWords} characters.`);
  }
  return trimmed === '' ? null : trimmed;
}

function tempo(value: string | undefined): number | 'none' | null {
  if (value === undefined) return null;
  if (value === 'none') return 'none';
  const bpm = Number(value.replace(',', '.'));
  if (value.trim() === '' || !(bpm >= 10 && bpm <= 999)) {
    throw new ArgumentProblem('--tempo takes a number from 10 to 999, or "none".');
  }
  return bpm;
}
