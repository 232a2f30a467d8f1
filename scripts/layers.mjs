// The house's walls: which folder may import which, who owns which package, no cycles, no orphan, no `utils`.
// `node scripts/layers.mjs` checks src/; tests/layers plants breaches and expects each to be found.
import { readdirSync, readFileSync, statSync } from 'node:fs'
import { dirname, join, normalize, relative, sep } from 'node:path'
import { fileURLToPath } from 'node:url'
import { parseSync } from 'vite'

/** Folder -> the folders it may import besides itself, and what to do instead of reaching further. The most specific folder wins. */
export const rooms = {
  units: { may: [], instead: 'units/ stands on nothing: pass what it needs as an argument.' },
  geometry: { may: ['units'], instead: 'geometry/ knows no survey: let plan/ turn the record into numbers.' },
  record: {
    may: ['units'],
    instead: 'record/ keeps facts and judges nothing: take a catalogue look-up as an argument.',
  },
  catalogue: { may: ['units', 'record'], instead: 'catalogue/ is data: a rule about a row belongs in judge/.' },
  standards: { may: ['units'], instead: 'standards/ is data: a rule about a row belongs in judge/.' },
  plan: {
    may: ['units', 'geometry', 'record', 'catalogue'],
    instead: 'plan/ draws what was measured: solving it is leash/, judging it is judge/.',
  },
  leash: {
    may: ['units', 'geometry'],
    instead: 'leash/ sees numbers only: build the scene in plan/ and hand it over.',
  },
  judge: {
    may: ['units', 'geometry', 'record', 'catalogue', 'standards', 'plan', 'leash'],
    instead: 'judge/ is the one entry to the core: words for readers belong in sheets/.',
  },
  'sheets/content': {
    may: ['units', 'geometry', 'record', 'catalogue', 'standards', 'plan', 'leash', 'judge'],
    instead: 'the outline knows no form: let each form read the outline.',
  },
  'sheets/html': { may: ['sheets/content', 'units'], instead: 'forms are peers: they share content/ alone.' },
  'sheets/text': { may: ['sheets/content', 'units'], instead: 'forms are peers: they share content/ alone.' },
  'sheets/audio': { may: ['sheets/content', 'units'], instead: 'forms are peers: they share content/ alone.' },
  'sheets/braille': { may: ['sheets/content', 'units'], instead: 'forms are peers: they share content/ alone.' },
  'sheets/pdf': { may: ['sheets/content', 'units'], instead: 'forms are peers: they share content/ alone.' },
  'sheets/word': { may: ['sheets/content', 'units'], instead: 'forms are peers: they share content/ alone.' },
  'sheets/csv': {
    may: ['sheets/content', 'units', 'record', 'catalogue', 'judge'],
    instead: 'a table of readings lists what was recorded and judged: it works nothing out.',
  },
  'sheets/geo': {
    may: ['sheets/content', 'units', 'geometry', 'record', 'catalogue', 'plan', 'judge'],
    instead: 'the map form draws the plan and the verdicts as they are: it works nothing out.',
  },
  sync: {
    may: ['units', 'record'],
    instead: 'sync/ says what goes over the line: take the store, the clock and fetch as arguments.',
  },
  store: { may: ['units', 'record'], instead: 'store/ keeps bytes: a page reaches it through app/state.' },
  workers: {
    may: ['units', 'geometry', 'record', 'catalogue', 'standards', 'plan', 'leash', 'judge', 'sheets'],
    instead: 'a worker runs the core: it knows no page and no database.',
  },
  app: {
    may: ['units', 'record', 'catalogue', 'standards', 'plan', 'judge', 'sheets', 'store', 'sync', 'workers'],
    instead: 'a page asks through judge/, workers/bridge or app/state; the planner itself runs in the worker.',
  },
  office: {
    may: ['units', 'record', 'catalogue', 'standards', 'plan', 'leash', 'judge', 'sheets', 'sync'],
    instead: 'the office keeps and hands on; what is true of a record is worked out in the core.',
  },
  'service-worker': { may: [], instead: 'the service worker serves what was built and imports none of it.' },
  cli: {
    may: ['units', 'geometry', 'record', 'catalogue', 'standards', 'plan', 'leash', 'judge', 'sheets'],
    instead: 'the terminal runs the core; it has no page, no worker and no database.',
  },
}

/** Package (or its scope) -> the rooms that own it, with the rooms within them. */
export const owners = {
  valibot: ['record', 'standards'],
  '@valibot/to-json-schema': ['record'],
  idb: ['store'],
  preact: ['app'],
  '@preact/signals': ['app'],
  'preact-iso': ['app'],
  leaflet: ['app'],
  pdfkit: ['sheets/pdf'],
  docx: ['sheets/word'],
  'liblouis-build': ['sheets/braille'],
  'workbox-window': ['app'],
  'workbox-precaching': ['service-worker'],
  'workbox-routing': ['service-worker'],
  'workbox-core': ['service-worker'],
  '@turf/': ['plan'],
  'node:': ['cli', 'office'],
  fastify: ['office'],
  '@fastify/': ['office'],
  kysely: ['office'],
  libsql: ['office'],
  pg: ['office'],
  'lean-qr': ['app', 'office'],
}

/** Files where a reader may come in from outside: everything else must be reached from one of them. */
const entries = [
  /^app\/main\.tsx$/,
  /^app\/vite\.config\.ts$/,
  /^cli\/main\.ts$/,
  /^office\/main\.ts$/,
  /^workers\/[^/]+\.worker\.ts$/,
  /^service-worker\/[^/]+\.ts$/,
  /\.d\.ts$/,
]

/** Finds every breach under `root` (a folder laid out like src/). Returns sentences, sorted; `files` is how many were read. */
export function inspect(root) {
  const files = listSources(root)
  const imports = new Map(files.map((file) => [file, importsOf(join(root, file))]))
  const breaches = []
  for (const [file, specifiers] of imports) {
    const room = roomOf(file)
    if (!room) breaches.push(`${file}: stands in no room of the table in scripts/layers.mjs`)
    if (/(^|\/)(utils?|helpers?|common|misc)(\/|\.)/.test(file))
      breaches.push(`${file}: name it for its idea, not utils`)
    for (const specifier of specifiers) {
      if (specifier.startsWith('.')) {
        const target = normalize(join(dirname(file), specifier))
          .split(sep)
          .join('/')
        const targetRoom = roomOf(target)
        if (room && targetRoom && targetRoom !== room && !allows(room, targetRoom))
          breaches.push(`${file} -> ${target}: ${rooms[room].instead}`)
        if (room === 'app' && targetRoom === 'workers' && target !== 'workers/bridge.ts')
          breaches.push(`${file} -> ${target}: workers/bridge.ts is the only file of workers/ a page may import`)
      } else if (room) {
        const owned = Object.entries(owners).find(([name]) => matchesPackage(specifier, name))
        if (!owned && !specifier.startsWith('virtual:') && !(file === 'app/vite.config.ts'))
          breaches.push(`${file} -> ${specifier}: give the package an owner in scripts/layers.mjs`)
        if (
          owned &&
          !owned[1].some((owner) => room === owner || room.startsWith(`${owner}/`)) &&
          file !== 'app/vite.config.ts'
        )
          breaches.push(`${file} -> ${specifier}: only ${owned[1].join(', ')}/ may import it`)
      }
    }
  }
  breaches.push(...findCycles(imports), ...findOrphans(imports))
  return { files: files.length, breaches: breaches.sort() }
}

function allows(room, target) {
  return rooms[room].may.some((name) => target === name || target.startsWith(`${name}/`))
}

function roomOf(file) {
  return Object.keys(rooms)
    .filter((room) => file.startsWith(`${room}/`))
    .sort((one, other) => other.length - one.length)[0]
}

function matchesPackage(specifier, name) {
  return name.endsWith('/') || name.endsWith(':')
    ? specifier.startsWith(name)
    : specifier === name || specifier.startsWith(`${name}/`)
}

function listSources(root, folder = '') {
  return readdirSync(join(root, folder), { withFileTypes: true })
    .flatMap((entry) => {
      const path = folder ? `${folder}/${entry.name}` : entry.name
      return entry.isDirectory() ? listSources(root, path) : /\.tsx?$/.test(path) ? [path] : []
    })
    .sort()
}

/** Static, dynamic, re-exported and type-only imports alike, and modules named by `new URL(..., import.meta.url)`. */
function importsOf(path) {
  const source = readFileSync(path, 'utf8')
  const { program, errors } = parseSync(path, source)
  if (errors.length > 0) throw new Error(`${path} does not parse: ${errors[0].message}`)
  const found = new Set()
  const visit = (node) => {
    if (!node || typeof node !== 'object') return
    if (Array.isArray(node)) return node.forEach(visit)
    const literal = node.source ?? (node.type === 'TSImportType' ? (node.argument?.literal ?? node.argument) : null)
    if (literal && typeof literal.value === 'string') found.add(literal.value)
    if (node.type === 'NewExpression' && node.callee?.name === 'URL' && typeof node.arguments[0]?.value === 'string')
      if (/\.tsx?$/.test(node.arguments[0].value)) found.add(node.arguments[0].value)
    for (const key of Object.keys(node)) if (key !== 'source' && key !== 'parent') visit(node[key])
  }
  visit(program)
  return [...found].filter((specifier) => !/\.(css|svg|json)(\?|$)/.test(specifier)).map((s) => s.replace(/\?.*$/, ''))
}

function targetsOf(imports, file) {
  return imports
    .get(file)
    .filter((specifier) => specifier.startsWith('.'))
    .map((specifier) =>
      normalize(join(dirname(file), specifier))
        .split(sep)
        .join('/'),
    )
    .filter((target) => imports.has(target))
}

function findCycles(imports) {
  const done = new Set()
  const cycles = []
  const walk = (file, trail) => {
    const at = trail.indexOf(file)
    if (at >= 0) return void cycles.push(`cycle: ${[...trail.slice(at), file].join(' -> ')}`)
    if (done.has(file)) return
    for (const target of targetsOf(imports, file)) walk(target, [...trail, file])
    done.add(file)
  }
  for (const file of imports.keys()) walk(file, [])
  return cycles
}

function findOrphans(imports) {
  const reached = new Set([...imports.keys()].filter((file) => entries.some((entry) => entry.test(file))))
  const queue = [...reached]
  for (const file of queue)
    for (const target of targetsOf(imports, file))
      if (!reached.has(target)) {
        reached.add(target)
        queue.push(target)
      }
  return [...imports.keys()]
    .filter((file) => !reached.has(file))
    .map((file) => `${file}: no entry reaches it: delete it or use it`)
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  const root = join(dirname(fileURLToPath(import.meta.url)), '..', 'src')
  statSync(root)
  const { files, breaches } = inspect(root)
  for (const breach of breaches) console.error(breach)
  console.log(`layers: ${files} files read, ${breaches.length} breaches (${relative(process.cwd(), root) || root})`)
  if (files === 0 || breaches.length > 0) process.exit(1)
}
