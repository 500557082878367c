import { expect, it } from 'vitest';
import { hashPassword, verifyPassword } from '../../server/accounts/passwords.ts';

it("hashes with argon2id at the parameters of OWASP's Password Storage Cheat Sheet", async () => {
  const [one, two] = [await hashPassword('a long password'), await hashPassword('a long password')];
  // PHC string format: m in KiB, t passes, p lanes.
  expect(one).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$[\w+/]{22}\$[\w+/]{43}$/);
  expect(one).not.toBe(two);
  expect(await verifyPassword(one, 'a long password')).toBe(true);
  expect(await verifyPassword(one, 'a long passworD')).toBe(false);
});

it('takes about as long for an account that does not exist', async () => {
  const stored = await hashPassword('a long password');
  const median = async (passwordHash: string | null) => {
    const times: number[] = [];
    for (let turn = 0; turn < 9; turn += 1) {
      const start = performance.now();
      expect(await verifyPassword(passwordHash, 'a wrong password')).toBe(false);
      times.push(performance.now() - start);
    }
    return times.sort((a, b) => a - b)[4] ?? 0;
  };
  await verifyPassword(null, 'the first one makes the hash to compare with');
  const ratio = (await median(null)) / (await median(stored));
  expect(ratio).toBeGreaterThan(1 / 3);
  expect(ratio).toBeLessThan(3);
});
