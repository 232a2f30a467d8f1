import './app.css'
import { render } from 'preact'
import { App } from './routes.tsx'
import { watchForUpdate } from './state/update-ready.ts'

const place = document.getElementById('app')
if (!place) throw new Error('app/no-place: index.html has no element with the id "app"')
render(<App />, place)
void watchForUpdate()
// Not needed for the first picture. Where the browser keeps nothing, the page says so by itself.
import('./state/office.ts').then(({ office }) => office()).catch(() => undefined)
