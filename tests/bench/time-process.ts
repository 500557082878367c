import { spawn } from 'node:child_process';
import { createInterface } from 'node:readline';

/** What some processes cost together. */
export type Cost = {
  /** User and system time. */
  cpuSeconds: number;
  wallSeconds: number;
  /** Of the largest of them. */
  peakBytes: number;
};

/**
 * Node does not say what a child cost; Python's os.wait4 does. One Python process takes commands
 * as lines of JSON, runs each with its output thrown away and answers with the kernel's account.
 */
const runner = `
import json, os, sys, time
quiet = os.open(os.devnull, os.O_RDWR)
for line in sys.stdin:
    command = json.loads(line)
    start = time.monotonic()
    child = os.fork()
    if child == 0:
        os.dup2(quiet, 0); os.dup2(quiet, 1); os.dup2(quiet, 2)
        try:
            os.execvp(command[0], command)
        finally:
            os._exit(127)
    _, status, usage = os.wait4(child, 0)
    print(json.dumps({
        "code": os.waitstatus_to_exitcode(status),
        "cpuSeconds": usage.ru_utime + usage.ru_stime,
        "wallSeconds": time.monotonic() - start,
        "peakBytes": usage.ru_maxrss * 1024,
    }), flush=True)
`;

export type ProcessTimer = {
  /**
   * Runs the commands one after the other and adds up what they cost. Throws when one exits with
   * a code that is not among `expected`.
   */
  time(commands: readonly (readonly string[])[], expected?: readonly number[]): Promise<Cost>;
  close(): void;
};

export function openProcessTimer(): ProcessTimer {
  const python = spawn('python3', ['-c', runner], { stdio: ['pipe', 'pipe', 'inherit'] });
  const answers = createInterface({ input: python.stdout })[Symbol.asyncIterator]();
  return {
    async time(commands, expected = [0]) {
      const total: Cost = { cpuSeconds: 0, wallSeconds: 0, peakBytes: 0 };
      for (const command of commands) {
        python.stdin.write(`${JSON.stringify(command)}\n`);
        const answer = await answers.next();
        if (answer.done) throw new Error('python3 is gone.');
        const cost = JSON.parse(answer.value) as Cost & { code: number };
        if (!expected.includes(cost.code)) {
          throw new Error(`${command.join(' ')} exited with ${cost.code}.`);
        }
        total.cpuSeconds += cost.cpuSeconds;
        total.wallSeconds += cost.wallSeconds;
        total.peakBytes = Math.max(total.peakBytes, cost.peakBytes);
      }
      return total;
    },
    close: () => python.stdin.end(),
  };
}

export function median(values: readonly number[]): number {
  const sorted = values.toSorted((a, b) => a - b);
  const middle = Math.floor(sorted.length / 2);
  return sorted.length % 2 ? sorted[middle]! : (sorted[middle - 1]! + sorted[middle]!) / 2;
}
