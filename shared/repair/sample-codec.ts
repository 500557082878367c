/**
 * Samples as a WAV file holds them: little-endian, interleaved, integers left-justified in their
 * container, 8-bit unsigned around 0x80, everything wider signed, float as IEEE 754.
 */
export type SampleForm = {
  encoding: 'pcm' | 'float';
  /** Bits that count: 20 for 20-in-24. */
  bits: number;
  /** Bits a sample takes up, a multiple of 8. */
  containerBits: number;
};

export const bytesPerSample = (form: SampleForm): number => form.containerBits / 8;

/** The byte digital silence is made of. */
export function silenceByte(form: SampleForm): number {
  return form.encoding === 'pcm' && form.containerBits === 8 ? 0x80 : 0;
}

/** Decodes every sample of `bytes` to full scale = 1, in the order they lie. */
export function decodeSamples(bytes: Uint8Array, form: SampleForm, into: Float64Array): void {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const width = bytesPerSample(form);
  const count = Math.floor(bytes.length / width);
  if (form.encoding === 'float') {
    for (let i = 0; i < count; i++) {
      into[i] = width === 8 ? view.getFloat64(8 * i, true) : view.getFloat32(4 * i, true);
    }
    return;
  }
  const scale = 2 ** (form.containerBits - 1);
  if (width === 1) for (let i = 0; i < count; i++) into[i] = (bytes[i]! - 0x80) / scale;
  else if (width === 2)
    for (let i = 0; i < count; i++) into[i] = view.getInt16(2 * i, true) / scale;
  else if (width === 3) {
    for (let i = 0, at = 0; i < count; i++, at += 3) {
      const value = bytes[at]! | (bytes[at + 1]! << 8) | (bytes[at + 2]! << 16);
      into[i] = ((value << 8) >> 8) / scale;
    }
  } else for (let i = 0; i < count; i++) into[i] = view.getInt32(4 * i, true) / scale;
}

/**
 * Encodes `count` values (full scale = 1) into `bytes`. Integers are rounded to their `bits`
 * (ties away from minus infinity) and held within full scale; float is stored as it is.
 */
export function encodeSamples(
  values: Float64Array,
  count: number,
  form: SampleForm,
  bytes: Uint8Array,
): void {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const width = bytesPerSample(form);
  if (form.encoding === 'float') {
    for (let i = 0; i < count; i++) {
      if (width === 8) view.setFloat64(8 * i, values[i]!, true);
      else view.setFloat32(4 * i, values[i]!, true);
    }
    return;
  }
  const steps = 2 ** (form.bits - 1);
  const shift = 2 ** (form.containerBits - form.bits);
  for (let i = 0; i < count; i++) {
    const rounded = Math.floor(values[i]! * steps + 0.5);
    const value = Math.max(-steps, Math.min(steps - 1, rounded)) * shift;
    if (width === 1) bytes[i] = value + 0x80;
    else if (width === 2) view.setInt16(2 * i, value, true);
    else if (width === 4) view.setInt32(4 * i, value, true);
    else {
      bytes[3 * i] = value & 0xff;
      bytes[3 * i + 1] = (value >> 8) & 0xff;
      bytes[3 * i + 2] = (value >> 16) & 0xff;
    }
  }
}
