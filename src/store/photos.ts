import { type Database, openWriting, type Photo } from './database.ts'
import { type Trouble, troubleOf } from './trouble.ts'

/** Keeps a photo's bytes; resolves when they are durable. The same photo twice is one. */
export async function keepPhoto(database: Database, photo: Photo): Promise<{ saved: true } | Trouble> {
  try {
    const tx = openWriting(database, ['photos'])
    await Promise.all([tx.objectStore('photos').put(photo), tx.done])
    return { saved: true }
  } catch (error) {
    return troubleOf(error)
  }
}

export async function readPhoto(database: Database, id: string): Promise<Photo | null> {
  return (await database.get('photos', id)) ?? null
}
