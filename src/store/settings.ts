import { type Database, openWriting } from './database.ts'
import { type Trouble, troubleOf } from './trouble.ts'

/** What the person chose on this phone. Keys that this version does not know are kept. */
export interface Settings {
  person?: string
  units?: 'metric' | 'imperial'
  theme?: 'system' | 'light' | 'dark'
  [more: string]: unknown
}

const deviceKey = 'device'

/** This phone's id in facts; made on first use, the same for every tab. */
export async function deviceId(database: Database): Promise<string> {
  const tx = database.transaction('settings', 'readwrite', { durability: 'strict' })
  const known = await tx.store.get(deviceKey)
  const id = typeof known === 'string' ? known : newDeviceId()
  if (known !== id) await tx.store.put(id, deviceKey)
  await tx.done
  return id
}

/** A new id for a phone that was copied or restored: two phones must never hand out the same numbers. */
export async function renewDeviceId(database: Database): Promise<string> {
  const id = newDeviceId()
  await database.put('settings', id, deviceKey)
  return id
}

export async function readSettings(database: Database): Promise<Settings> {
  const tx = database.transaction('settings')
  const [keys, values] = await Promise.all([tx.store.getAllKeys(), tx.store.getAll()])
  return Object.fromEntries(keys.map((key, i) => [key, values[i]]).filter(([key]) => key !== deviceKey))
}

/** Changes the settings given; undefined forgets one. The phone's id is none of them. */
export async function changeSettings(database: Database, change: Settings): Promise<{ saved: true } | Trouble> {
  try {
    const tx = openWriting(database, ['settings'])
    const settings = tx.objectStore('settings')
    for (const [key, value] of Object.entries(change)) {
      if (key === deviceKey) continue
      if (value === undefined) await settings.delete(key)
      else await settings.put(value, key)
    }
    await tx.done
    return { saved: true }
  } catch (error) {
    return troubleOf(error)
  }
}

function newDeviceId(): string {
  const bytes = crypto.getRandomValues(new Uint8Array(10))
  return [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join('')
}
