import { customType, timestamp, uuid } from 'drizzle-orm/pg-core';
import { v7 as uuidV7 } from 'uuid';

/** A primary key: UUID version 7 (RFC 9562, section 5.7), so keys sort by the time of making. */
export function key() {
  return uuid('id')
    .primaryKey()
    .$defaultFn(() => uuidV7());
}

/** A moment in UTC, in whole milliseconds like JavaScript's own dates. */
export function moment(name: string) {
  return timestamp(name, { withTimezone: true, precision: 3, mode: 'date' });
}

/** Bytes as they are. */
export const bytea = customType<{ data: Uint8Array; driverData: Buffer }>({
  dataType: () => 'bytea',
  toDriver: (bytes) => Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength),
});
