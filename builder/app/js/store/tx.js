/**
 * The only way into IndexedDB: opens a database, runs one transaction to its end, and opens the
 * database once more when the connection was lost in the background.
 */
import { Fault, faultOf } from './faults.js';

/**
 * @typedef {object} Connection
 * @property {string} name
 * @property {Array<(db: IDBDatabase, tx: IDBTransaction) => void>} steps  one per version, in order
 * @property {Promise<IDBDatabase>|null} opening
 */

/**
 * @param {string} name
 * @param {Connection['steps']} steps  step n lifts version n to n + 1; a released step never changes
 * @returns {Connection}
 */
export function connectionTo(name, steps) {
  return { name, steps, opening: null };
}

/**
 * The open database. Opened on first use, and again after it was closed.
 *
 * @param {Connection} connection
 * @returns {Promise<IDBDatabase>}
 */
export function opened(connection) {
  connection.opening ??= openDatabase(connection).catch((error) => {
    connection.opening = null;
    throw faultOf(error);
  });
  return connection.opening;
}

function openDatabase(connection) {
  return new Promise((resolve, reject) => {
    if (!globalThis.indexedDB) throw new Fault('none');
    const request = indexedDB.open(connection.name, connection.steps.length);
    request.onupgradeneeded = (event) => {
      for (const step of connection.steps.slice(event.oldVersion)) step(request.result, request.transaction);
    };
    request.onblocked = () => reject(new Fault('blocked'));
    request.onerror = () => reject(request.error);
    request.onsuccess = () => {
      const db = request.result;
      const forget = () => { connection.opening = null; };
      db.onclose = forget;
      // Another tab with a newer version must be able to upgrade.
      db.onversionchange = () => { forget(); db.close(); };
      resolve(db);
    };
  });
}

/** Closes the connection; the next use opens it again. @param {Connection} connection */
export async function closed(connection) {
  const opening = connection.opening;
  connection.opening = null;
  if (opening) (await opening).close();
}

/**
 * Runs one transaction to its end and gives the result of `work` once it is on the disk.
 * Settles on abort too: a full phone aborts without an error event.
 *
 * @template T
 * @param {Connection} connection
 * @param {string[]} names  object stores
 * @param {IDBTransactionMode} mode
 * @param {(...stores: IDBObjectStore[]) => {result: T}} work  synchronous; gives a request, or any
 *   object whose `result` is set by the time the transaction ends
 * @returns {Promise<T>}
 */
export async function inStore(connection, names, mode, work) {
  try {
    return await transact(await opened(connection), names, mode, work);
  } catch (error) {
    if (faultOf(error).code !== 'lost') throw faultOf(error);
    connection.opening = null;
  }
  // Phones close databases of pages in the background: open again and try once more.
  try {
    return await transact(await opened(connection), names, mode, work);
  } catch (error) {
    throw faultOf(error);
  }
}

function transact(db, names, mode, work) {
  return new Promise((resolve, reject) => {
    const tx = db.transaction(names, mode, { durability: 'strict' });
    let request;
    tx.oncomplete = () => resolve(request.result);
    tx.onabort = () => reject(tx.error ?? new DOMException('Not saved', 'AbortError'));
    request = work(...names.map((name) => tx.objectStore(name)));
  });
}
