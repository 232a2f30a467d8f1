import { ErrorBoundary, LocationProvider, lazy, Route, Router, useLocation } from 'preact-iso'
import { UpdateReady } from './components/update-ready.tsx'
import { VerdictPatterns } from './components/verdict-mark.tsx'
import { NotFound } from './screens/not-found.tsx'
import { VenuesScreen } from './screens/venues/venues-screen.tsx'
import { takeUpdate, updateReady } from './state/update-ready.ts'
import { inVenue, inWalk } from './with-session.tsx'

const StripScreen = lazy(() => import('./screens/strip/strip-screen.tsx').then((module) => module.StripScreen))
const LeavingScreen = lazy(() => import('./screens/leaving/leaving-screen.tsx').then((module) => module.LeavingScreen))
const LadderScreen = lazy(() => import('./screens/ladder/ladder-screen.tsx').then((module) => module.LadderScreen))
const SheetScreen = lazy(() => import('./screens/sheet/sheet-screen.tsx').then((module) => module.SheetScreen))
const VenueScreen = lazy(() => import('./screens/venue/venue-screen.tsx').then((module) => module.VenueScreen))
const TeamScreen = lazy(() => import('./screens/team/team-screen.tsx').then((module) => module.TeamScreen))
const SyncScreen = lazy(() => import('./screens/sync/sync-screen.tsx').then((module) => module.SyncScreen))
const SettingsScreen = lazy(() =>
  import('./screens/settings/settings-screen.tsx').then((module) => module.SettingsScreen),
)

const Strip = inWalk(StripScreen)
const Leaving = inWalk(LeavingScreen)
const Ladder = inWalk(LadderScreen)
const SheetPage = inWalk(SheetScreen)
const Venue = inVenue(VenueScreen)
const Team = inVenue(TeamScreen)

/** Every page and its address. */
export function App() {
  return (
    <LocationProvider>
      <VerdictPatterns />
      <ErrorBoundary>
        <Router>
          <Route path="/" component={VenuesScreen} />
          <Route path="/venue/:survey" component={Venue} />
          <Route path="/venue/:survey/team" component={Team} />
          <Route path="/venue/:survey/walk/:walk" component={Strip} />
          <Route path="/venue/:survey/walk/:walk/leave" component={Leaving} />
          <Route path="/venue/:survey/walk/:walk/ladder" component={Ladder} />
          <Route path="/venue/:survey/walk/:walk/sheet" component={SheetPage} />
          <Route path="/settings" component={SettingsScreen} />
          <Route path="/sync" component={SyncScreen} />
          <Route path="/enrol" component={SyncScreen} />
          <Route default component={NotFound} />
        </Router>
      </ErrorBoundary>
      <Update />
    </LocationProvider>
  )
}

/** Never on the recording page: there the keys are where the prompt would stand. */
function Update() {
  const { path } = useLocation()
  return /\/walk\/[^/]+$/.test(path) ? null : <UpdateReady ready={updateReady} take={takeUpdate} />
}
