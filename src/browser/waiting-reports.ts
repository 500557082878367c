/**
 * A drawer in this browser's IndexedDB for what could not be sent: kept until it is taken out,
 * also when the tab is closed. Values are structured-cloneable, one a key.
 */
const databaseName = 'flightcase';
const storeName = 'waiting';

export async function putWaiting(key: string, value: unknown): Promise<void> {
  await inStore('readwrite', (store) => store.put(value, key));
}

export async function removeWaiting(key: string): Promise<void> {
  await inStore('readwrite', (store) => store.delete(key));
}

export async function listWaiting(): Promise<unknown[]> {
  return inStore('readonly', (store) => store.getAll());
}

async function inStore<Result>(
  mode: IDBTransactionMode,
  work: (store: IDBObjectStore) => IDBRequest<Result>,
): Promise<Result> {
  const database = await open();
  try {
    const transaction = database.transaction(storeName, mode);
    const request = work(transaction.objectStore(storeName));
    await new Promise<void>((resolve, reject) => {
      transaction.oncomplete = () => resolve();
      transaction.onabort = () => reject(transaction.error ?? new Error('aborted'));
    });
    return request.result;
  } finally {
    database.close();
  }
}

function open(): Promise<IDBDatabase> {
  return new Promise((resolve, reject) => {
    const request = indexedDB.open(databaseName, 1);
    request.onupgradeneeded = () => request.result.createObjectStore(storeName);
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(request.error ?? new Error('the storage did not open'));
  });
}
