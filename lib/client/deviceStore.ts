/** What is kept on the device: answers of the API, checks that wait to be sent, files chosen without a network. */
export type DeviceStore = 'answers' | 'waiting' | 'files';

const stores: readonly DeviceStore[] = ['answers', 'waiting', 'files'];
let opening: Promise<IDBDatabase> | undefined;

function openDevice(): Promise<IDBDatabase> {
  opening ??= new Promise<IDBDatabase>((resolve, reject) => {
    const request = indexedDB.open('ebbline', 1);
    request.onupgradeneeded = () => {
      for (const store of stores) request.result.createObjectStore(store);
    };
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(request.error);
    request.onblocked = () => reject(new Error('the store of the device is held by an older page'));
  }).catch((error: unknown) => {
    opening = undefined;
    throw error;
  });
  return opening;
}

/** Runs one request in a transaction of its own; resolves when it is committed. */
async function run<T>(
  store: DeviceStore,
  mode: IDBTransactionMode,
  ask: (objects: IDBObjectStore) => IDBRequest<T>,
): Promise<T> {
  const device = await openDevice();
  return new Promise((resolve, reject) => {
    const transaction = device.transaction(store, mode);
    const request = ask(transaction.objectStore(store));
    transaction.oncomplete = () => resolve(request.result);
    transaction.onerror = transaction.onabort = () => reject(transaction.error);
  });
}

/** Storage may be denied or full: what can not be kept is lacking later, and nothing else goes wrong. */
const orElse = <T>(work: Promise<T>, instead: T): Promise<T> => work.catch(() => instead);

const below = (prefix: string) => IDBKeyRange.bound(prefix, `${prefix}\uffff`);

/** What is kept under a key; undefined for nothing. Keys begin with the account's id and a slash. */
export const readKept = async <T>(store: DeviceStore, key: string): Promise<T | undefined> =>
  orElse(
    run(store, 'readonly', (objects) => objects.get(key) as IDBRequest<T | undefined>),
    undefined,
  );

/** @returns whether it is kept */
export const keep = async (store: DeviceStore, key: string, value: unknown): Promise<boolean> =>
  orElse(
    run(store, 'readwrite', (objects) => objects.put(value, key)).then(() => true),
    false,
  );

export const forget = async (store: DeviceStore, key: string): Promise<void> =>
  orElse(
    run(store, 'readwrite', (objects) => objects.delete(key)),
    undefined,
  );

/** Everything whose key begins so. */
export const readAllKept = async <T>(store: DeviceStore, prefix: string): Promise<T[]> =>
  orElse(
    run(store, 'readonly', (objects) => objects.getAll(below(prefix)) as IDBRequest<T[]>),
    [],
  );

/** Forgets everything whose key begins so. */
export const forgetAll = async (store: DeviceStore, prefix: string): Promise<void> =>
  orElse(
    run(store, 'readwrite', (objects) => objects.delete(below(prefix))),
    undefined,
  );
