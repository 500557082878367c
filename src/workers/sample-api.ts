/** What the sample worker does: make the files of the sample session, once. */
export type SampleApi = {
  make: {
    input: null;
    progress: { done: number; of: number };
    output: { path: string; file: File }[];
  };
};
