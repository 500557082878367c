/**
 * Memory of one file's meters: handed out front to back, given back all at once. The module has
 * no garbage collector and needs none, because nothing is created while samples go through.
 */

const pageBytes: usize = 65536;

let top: usize = 0;

/** Forgets everything that was handed out. */
export function resetArena(): void {
  top = (__heap_base + 15) & ~15;
}

/** `bytes` zeroed bytes at an address divisible by 16. */
export function allocate(bytes: usize): usize {
  const address = top;
  top = (top + bytes + 15) & ~15;
  const missing = <isize>top - ((<isize>memory.size()) << 16);
  if (missing > 0) {
    const pages = <i32>((<usize>missing + pageBytes - 1) / pageBytes);
    if (memory.grow(pages) < 0) unreachable();
  }
  memory.fill(address, 0, bytes);
  return address;
}
