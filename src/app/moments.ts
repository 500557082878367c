/** A day as people write it, in their own time zone: "1 December 2026". */
export function dayWords(moment: string): string {
  return new Intl.DateTimeFormat('en-GB', { dateStyle: 'long' }).format(new Date(moment));
}

/** A day and a time in the person's own zone: "1 Dec 2026, 15:20". */
export function momentWords(moment: string): string {
  return new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeStyle: 'short' }).format(
    new Date(moment),
  );
}
