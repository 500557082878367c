/**
 * CRC-32 as in zip (ISO 3309, reflected polynomial 0xEDB88320), without a table look-up a byte.
 *
 * The remainder modulo the generator P does not change when the message is first reduced modulo
 * a multiple of P. x^300 + x^155 + x^117 + x^89 + 1 is such a multiple (the only one of five
 * terms below degree 420), and over GF(2) so is its 128th power, which has the same five terms
 * 128 times as far apart. Therefore a word of 128 bits can be cancelled by adding it, unshifted,
 * to the words 145, 183, 211 and 300 places later: four exclusive ors for 16 bytes. Only the
 * last 300 words have to be divided by P byte by byte.
 */

const words: i32 = 300;
const tap1: usize = 145 * 16;
const tap2: usize = 183 * 16;
const tap3: usize = 211 * 16;
const tap4: usize = 300 * 16;

/** Words folded before the last 300 are moved back to the front. */
const roomWords: i32 = 1024;

const historyBytes: usize = tap4;
const ahead1: usize = tap4 - tap1;
const ahead2: usize = tap4 - tap2;
const ahead3: usize = tap4 - tap3;
const roomBytes: usize = <usize>roomWords * 16;

const window: usize = memory.data(4800 + 16384, 16);
const partial: usize = memory.data(16, 16);
const table: usize = memory.data(1024, 16);

let partialBytes: usize = 0;
/** Folded words that lie in the window behind the 300 of its history. */
let roomUsed: usize = 0;
let started: bool = false;

function fillTable(): void {
  for (let n: u32 = 0; n < 256; n++) {
    let c = n;
    for (let k = 0; k < 8; k++) c = c & 1 ? 0xedb88320 ^ (c >>> 1) : c >>> 1;
    store<u32>(table + ((<usize>n) << 2), c);
  }
}

export function resetCrc(): void {
  fillTable();
  memory.fill(window, 0, historyBytes + roomBytes);
  partialBytes = 0;
  roomUsed = 0;
  started = false;
}

/** Folds `count` words of 16 bytes. */
function fold(address: usize, count: usize): void {
  while (count > 0) {
    if (roomUsed == roomBytes) {
      memory.copy(window, window + roomBytes, historyBytes);
      roomUsed = 0;
    }
    const free = (roomBytes - roomUsed) >> 4;
    const now = min(free, count);
    // Seen from the oldest word that takes part, all others lie ahead at fixed distances.
    let oldest = window + roomUsed;
    const end = oldest + (now << 4);
    for (; oldest < end; oldest += 16, address += 16) {
      let word = v128.xor(v128.load(address), v128.load(oldest));
      word = v128.xor(word, v128.load(oldest, ahead3));
      word = v128.xor(word, v128.load(oldest, ahead2));
      word = v128.xor(word, v128.load(oldest, ahead1));
      v128.store(oldest, word, historyBytes);
    }
    roomUsed += now << 4;
    count -= now;
  }
}

/** The first four bytes are inverted: what an initial register of all ones means. */
function foldFirst(): void {
  store<u32>(partial, ~load<u32>(partial));
  fold(partial, 1);
  started = true;
}

export function updateCrc(address: usize, bytes: usize): void {
  if (partialBytes > 0 || !started) {
    const missing = min<usize>(16 - partialBytes, bytes);
    memory.copy(partial + partialBytes, address, missing);
    partialBytes += missing;
    address += missing;
    bytes -= missing;
    if (partialBytes < 16) return;
    if (started) fold(partial, 1);
    else foldFirst();
    partialBytes = 0;
  }
  const whole = bytes >> 4;
  fold(address, whole);
  const rest = bytes & 15;
  memory.copy(partial, address + (whole << 4), rest);
  partialBytes = rest;
}

function divide(register: u32, address: usize, bytes: usize): u32 {
  for (let i: usize = 0; i < bytes; i++) {
    const index = (register ^ load<u8>(address + i)) & 255;
    register = load<u32>(table + ((<usize>index) << 2)) ^ (register >>> 8);
  }
  return register;
}

/** The CRC of everything so far; the state is used up by it. */
export function finishCrc(): u32 {
  if (!started) return ~divide(0xffffffff, partial, partialBytes);
  // The last 300 words hold what folding them added to each other: taken back, latest first.
  const first = window + roomUsed;
  for (let i = words - 1; i >= 0; i--) {
    const at = first + ((<usize>i) << 4);
    let word = v128.load(at);
    if (at >= first + tap1) word = v128.xor(word, v128.load(at - tap1));
    if (at >= first + tap2) word = v128.xor(word, v128.load(at - tap2));
    if (at >= first + tap3) word = v128.xor(word, v128.load(at - tap3));
    v128.store(at, word);
  }
  const folded = divide(0, first, (<usize>words) << 4);
  return ~divide(folded, partial, partialBytes);
}
