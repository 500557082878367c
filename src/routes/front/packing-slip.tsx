import './packing-slip.css';

/** What lies in the zip of the example, in the order an unpacking program lists it. */
const contents: readonly { name: string; size: string }[] = [
  { name: 'B Bass DI.wav', size: '29.6 MB' },
  { name: 'D Kick In.wav', size: '29.6 MB' },
  { name: 'D Snare Top.wav', size: '29.6 MB' },
  { name: 'G Guitar Rhythm L.wav', size: '29.6 MB' },
  { name: 'K Piano.wav', size: '29.6 MB' },
  { name: 'V Harmony High.wav', size: '29.6 MB' },
  { name: 'V Lead Vocal.wav', size: '29.6 MB' },
  { name: 'Rough mix/', size: '' },
  { name: 'check-report.json', size: '' },
  { name: 'SHA256SUMS.txt', size: '' },
];

/** The slip that comes with the case: everything in the zip, one file a line. */
export function PackingSlip() {
  return (
    <figure className="packing-slip mx-auto w-full max-w-96 -rotate-1 text-on-tape">
      <div className="bg-tape px-6 pt-5 pb-8">
        <figcaption className="border-b border-dashed border-on-tape/40 pb-3">
          <span className="block text-small">What you send</span>
          <span className="mt-1 block font-semibold">
            Velvet Tramline - Salt on the Windows - 112 BPM.zip
          </span>
        </figcaption>
        <ul className="figures mt-3 text-small leading-6">
          {contents.map(({ name, size }) => (
            <li key={name} className="flex justify-between gap-4">
              <span>{name}</span>
              <span>{size}</span>
            </li>
          ))}
        </ul>
        <p className="mt-3 border-t border-dashed border-on-tape/40 pt-3 text-small">
          All from the same start, all equally long, each with its checksum.
        </p>
      </div>
    </figure>
  );
}
