import { once } from 'node:events';
import { readdirSync, readFileSync } from 'node:fs';
import os from 'node:os';
import autocannon from 'autocannon';
import postgres from 'postgres';
import { migrate, seed, startServer } from '../../server/dev/application.mjs';
import { inCheckout } from '../../server/dev/checkout.mjs';
import { ensureDatabase } from '../../server/dev/databases.mjs';
import { freePort, loopback } from '../../server/dev/ports.mjs';
import { runProgram } from '../../server/dev/processes.mjs';
import { createSessions } from '../../server/accounts/sessions.ts';
import { openDatabase } from '../../server/db/client.ts';
import { systemClock } from '../../server/clock.ts';
import { startThrowawayCluster } from '../support/throwaway-cluster.ts';

/**
 * Signed-in list endpoints of the built server over a database with other people's rows in it:
 * first 500 requests a second, then as many as go. Aim: p99 under 100 ms at 500 a second on two
 * cores, with PostgreSQL and this load generator on the same two.
 *
 * Latencies mean little on a machine that has other work; the CPU time of a request, server and
 * PostgreSQL together, tells more there (500 a second need less than 4 ms on two cores).
 *
 *     npm run bench -- api [seconds] [paced]
 */
const aim = { requestsPerSecond: 500, p99Ms: 100 };
const seconds = Number(process.argv[2] ?? 20);
const pacedOnly = process.argv[3] === 'paced';

/** 5,000 people, 500 studios, 10,000 projects, 40,000 songs; 300 projects are Maren's. */
async function fill(databaseUrl) {
  const sql = postgres(databaseUrl, { max: 1, onnotice: () => {} });
  const id = (kind, number) =>
    `('0190${kind}-0000-7000-8000-' || lpad((${number})::text, 12, '0'))::uuid`;
  await sql.unsafe(`
    insert into users select ${id('0001', 'n')}, 'Person ' || n, 'person-' || n || '@load.example',
      '$argon2id$none', now() from generate_series(1, 5000) n;
    insert into studios select ${id('0002', 'n')}, 'load-' || n, 'Studio ' || n, now()
      from generate_series(1, 500) n;
    insert into studio_members select ${id('0003', 'n')}, ${id('0002', 'n')}, ${id('0001', 'n')},
      'owner', now() from generate_series(1, 500) n;
    insert into projects select ${id('0004', 'n')}, 'studio', ${id('0002', '1 + n % 500')}, null,
      'Project ' || n, 'Band ' || n, null, now() from generate_series(1, 10000) n;
    insert into projects select ${id('0005', 'n')}, 'studio', s.id, null, 'Project ' || n,
      'Band ' || n, e.id, now() from generate_series(1, 300) n, studios s
      join house_rules_editions e on e.studio_id = s.id where s.slug = 'harbour-lane-mixing';
    insert into songs select ${id('0006', 'n')}, ${id('0004', '1 + n % 10000')}, 'Song ' || n, now()
      from generate_series(1, 40000) n;
    analyze;`);
  const [maren] = await sql`select id from users where email = 'maren@harbour-lane.example'`;
  const [song] = await sql`select songs.id, project_id from songs
    where title = 'Salt on the Windows'`;
  await sql.unsafe(`
    insert into reports select ${id('0007', 'n')}, '${song.id}', ${id('0008', 'n')}, '${maren.id}',
      now(), null, repeat('a', 64), 1, 1, 1, 'ready', '{"must-fix":0,"look":0,"note":0}', 'same',
      '[]', '{}' from generate_series(1, 200) n`);
  await sql.end();
  return { userId: maren.id, songId: song.id, projectId: song.project_id };
}

function load(url, cookie, overallRate, duration = seconds) {
  const run = autocannon({
    url,
    connections: 20,
    duration,
    headers: { cookie },
    ...(overallRate ? { overallRate } : {}),
  });
  return once(run, 'done').then(([result]) => result);
}

/** CPU time a process and all below it have used, in milliseconds (proc(5): ticks of 10 ms). */
function cpuMs(rootPid) {
  const processes = readdirSync('/proc').flatMap((name) => {
    if (!/^\d+$/.test(name)) return [];
    try {
      const fields = readFileSync(`/proc/${name}/stat`, 'utf8').split(') ')[1].split(' ');
      const [parent, user, system] = [1, 11, 12].map((index) => Number(fields[index]));
      return [{ pid: Number(name), parent, ms: (user + system) * 10 }];
    } catch {
      return [];
    }
  });
  const below = (pid) => {
    const own = processes.find((candidate) => candidate.pid === pid)?.ms ?? 0;
    const children = processes.filter(({ parent }) => parent === pid);
    return children.reduce((sum, child) => sum + below(child.pid), own);
  };
  return below(rootPid);
}

function say(name, result, cpu) {
  const { latency } = result;
  const failures = result.non2xx + result.errors + result.timeouts;
  const rate = (result.requests.total / result.duration).toFixed(0);
  console.log(
    `${name.padEnd(44)} ${rate.padStart(5)} requests/s   p50 ${latency.p50} ms   ` +
      `p99 ${latency.p99} ms   longest ${latency.max} ms   ` +
      `CPU ${(cpu / result.requests.total).toFixed(2)} ms a request   ${failures} failed`,
  );
  return { rate: Number(rate), p99: latency.p99, failures };
}

const built = await runProgram(
  [process.execPath, inCheckout('server/dev/build.mjs'), '--quiet', 'server'],
  { cwd: inCheckout() },
);
if (built.code !== 0) throw new Error(`${built.stdout}\n${built.stderr}`);

const { cluster, stop } = await startThrowawayCluster();
try {
  const databaseUrl = await ensureDatabase(cluster, 'bench');
  await migrate(databaseUrl, 'built');
  await seed(databaseUrl, 'built');
  const { userId, songId, projectId } = await fill(databaseUrl);
  const { db, close } = openDatabase(databaseUrl, 1);
  const { cookie } = await createSessions(db, systemClock).start(userId);
  await close();

  const port = await freePort();
  const origin = `http://${loopback}:${port}`;
  const server = await startServer({
    ...{ form: 'built', port, publicOrigin: origin, databaseUrl, smtpPort: 1 },
    logFolder: inCheckout('.data', 'bench-log'),
  });
  console.log(`${os.cpus().length} cores, load average before: ${os.loadavg()[0].toFixed(1)}\n`);
  const lists = [
    ['my projects, 50 of 302', '/api/projects'],
    ["a song's reports, 50 of 200", `/api/songs/${songId}/reports`],
    ["a project's songs, 3", `/api/projects/${projectId}/songs`],
  ];
  const pair = cookie.split(';')[0];
  // The compiler of hot paths has its say before anything is counted.
  for (const [, path] of lists) await load(`${origin}${path}`, pair, 100, 2);
  const used = () => cpuMs(server.child.pid) + cpuMs(cluster.program.child.pid);
  const measure = async (name, url, rate) => {
    const before = used();
    const result = await load(url, pair, rate);
    return say(name, result, used() - before);
  };
  let held = true;
  for (const [name, path] of lists) {
    const url = `${origin}${path}`;
    const asked = `${name}, asked ${aim.requestsPerSecond}/s`;
    const { rate, p99, failures } = await measure(asked, url, aim.requestsPerSecond);
    held &&= rate >= aim.requestsPerSecond * 0.98 && p99 < aim.p99Ms && failures === 0;
    if (!pacedOnly) await measure(`${name}, as many as go`, url);
  }
  console.log(held ? '\nThe aim is held.' : '\nThe aim is missed.');
  process.exitCode = held ? 0 : 1;
  await server.stop();
} finally {
  await stop();
}
