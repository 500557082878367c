import { makeSampleSession } from '../check/sample-session/make-session.ts';
import { serveWorker } from './bridge.ts';
import type { SampleApi } from './sample-api.ts';

serveWorker<SampleApi>({
  make(_, { report }) {
    const files = makeSampleSession((done, of) => report({ done, of }));
    return Promise.resolve(
      files.map(({ name, bytes }) => ({
        path: name,
        // A fixed date: the same sample is the same files every time.
        file: new File([bytes], name, { type: 'audio/wav', lastModified: 0 }),
      })),
    );
  },
});
