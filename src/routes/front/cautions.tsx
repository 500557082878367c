const cautions: readonly [string, string][] = [
  [
    '“No findings” is no guarantee.',
    'It means that none of these checks found anything. What a microphone heard, and whether the song is good, is for people to say.',
  ],
  [
    'Turn it down before you listen.',
    'Auditions start quiet and stay below −12 dBFS, but clipped or broken audio can still be unpleasant on headphones.',
  ],
  [
    'Repairs that change the sound say so.',
    'They are offered one by one, with before and after, and the report lists every one of them.',
  ],
];

/** What the product does not promise, said on the first page and not in small print. */
export function Cautions() {
  return (
    <section aria-labelledby="cautions" className="py-16 sm:py-24">
      <h2 id="cautions" className="text-section">
        Plainly said
      </h2>
      <div className="mt-5 grid gap-x-12 gap-y-7 md:grid-cols-3">
        {cautions.map(([title, text]) => (
          <div key={title}>
            <h3 className="font-semibold">{title}</h3>
            <p className="mt-1 text-ink-2">{text}</p>
          </div>
        ))}
      </div>
    </section>
  );
}
