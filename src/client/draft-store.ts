/** Work that the server may not have yet, as it is kept on this device. */
export interface Draft<D, H> {
  /** Whose draft: another person who signs in on this device does not see it. */
  userId: string;
  planId: string;
  /** The version that the edits were made on, and what it held. */
  baseVersion: number;
  base: D;
  document: D;
  history: H;
  keptAt: string;
}

const databaseName = "stillneedle";
const storeName = "drafts";

type Key = [userId: string, planId: string];

function open(): Promise<IDBDatabase> {
  return new Promise((resolve, reject) => {
    const request = indexedDB.open(databaseName, 1);
    request.onupgradeneeded = () => {
      request.result.createObjectStore(storeName, { keyPath: ["userId", "planId"] });
    };
    request.onsuccess = () => resolve(request.result);
    request.onerror = () => reject(request.error ?? new Error("This browser keeps no drafts."));
  });
}

async function inStore<T>(
  mode: IDBTransactionMode,
  act: (store: IDBObjectStore) => IDBRequest<T>,
): Promise<T> {
  const database = await open();
  try {
    return await new Promise<T>((resolve, reject) => {
      const transaction = database.transaction(storeName, mode, { durability: "relaxed" });
      const request = act(transaction.objectStore(storeName));
      transaction.oncomplete = () => resolve(request.result);
      transaction.onabort = () => reject(transaction.error ?? new Error("The draft could not be kept."));
    });
  } finally {
    database.close();
  }
}

const keyOf = (userId: string, planId: string): Key => [userId, planId];

/** The draft of a plan on this device; null where there is none. Throws where the browser keeps nothing. */
export const loadDraft = async <D, H>(userId: string, planId: string): Promise<Draft<D, H> | null> =>
  (await inStore<Draft<D, H> | undefined>("readonly", (store) => store.get(keyOf(userId, planId)))) ?? null;

export const keepDraft = async <D, H>(draft: Draft<D, H>): Promise<void> => {
  await inStore("readwrite", (store) => store.put(draft));
};
