const DATABASE = 'lathkey-photos'
const TABLE = 'pictures'

/** Pictures on this phone that are not sent yet. Where the browser keeps nothing, they live as long as the page. */
export interface KeptPhotos {
  put: (id: string, picture: Blob) => Promise<void>
  get: (id: string) => Promise<Blob | undefined>
  remove: (ids: readonly string[]) => Promise<void>
  /** Forgets all but these. */
  sweep: (inUse: readonly string[]) => Promise<void>
}

const answerOf = <T>(request: IDBRequest<T>) => new Promise<T>((resolve, reject) => {
  request.onsuccess = () => resolve(request.result)
  request.onerror = () => reject(request.error ?? new Error('The browser kept no answer.'))
})

function openTable(factory: IDBFactory): Promise<IDBDatabase> {
  const request = factory.open(DATABASE, 1)
  request.onupgradeneeded = () => request.result.createObjectStore(TABLE)
  return answerOf(request)
}

export function keepPhotos(factory: IDBFactory | undefined): KeptPhotos {
  const atHand = new Map<string, Blob>()
  let opened: Promise<IDBDatabase> | undefined

  /** Undefined when the browser cannot or will not: private windows, full disks. */
  async function inTable<T>(mode: IDBTransactionMode, work: (table: IDBObjectStore) => IDBRequest<T>): Promise<T | undefined> {
    if (!factory) return undefined
    try {
      const database = await (opened ??= openTable(factory))
      return await answerOf(work(database.transaction(TABLE, mode).objectStore(TABLE)))
    }
    catch { return undefined }
  }

  async function remove(ids: readonly string[]) {
    for (const id of ids) {
      atHand.delete(id)
      await inTable('readwrite', table => table.delete(id))
    }
  }

  return {
    put: async (id, picture) => {
      atHand.set(id, picture)
      await inTable('readwrite', table => table.put(picture, id))
    },
    get: async id => atHand.get(id) ?? await inTable('readonly', table => table.get(id) as IDBRequest<Blob | undefined>),
    remove,
    sweep: async (inUse) => {
      const keys = await inTable('readonly', table => table.getAllKeys()) ?? []
      await remove(keys.map(String).filter(key => !inUse.includes(key)))
    },
  }
}
