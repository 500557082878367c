import react from '@vitejs/plugin-react';
import { defineConfig } from 'vitest/config';

export default defineConfig({
  test: {
    projects: [
      {
        test: {
          name: 'shared',
          environment: 'node',
          include: ['tests/shared/**/*.test.ts'],
          // Whole sessions are told and outside programs started, on machines that do other things.
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
      {
        test: { name: 'contracts', environment: 'node', include: ['tests/contracts/**/*.test.ts'] },
      },
      {
        plugins: [react()],
        test: {
          name: 'client',
          environment: 'jsdom',
          include: ['tests/src/**/*.test.{ts,tsx}'],
          setupFiles: ['tests/support/client-setup.ts'],
        },
      },
      {
        test: {
          name: 'server',
          environment: 'node',
          include: ['tests/server/**/*.test.ts'],
          globalSetup: ['tests/support/test-databases.ts'],
          // PostgreSQL and password hashes take their time where two cores do everything.
          testTimeout: 30_000,
          hookTimeout: 60_000,
        },
      },
    ],
  },
});
