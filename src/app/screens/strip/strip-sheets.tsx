import type { Feature, Walk } from '../../../record/survey.ts'
import { Sheet } from '../../components/strip/sheet.tsx'
import { featureName } from '../../components/strip/strip-words.ts'
import { AspectSheet } from './aspect-sheet.tsx'
import { FeatureSheet } from './feature-sheet.tsx'
import { MoreSheet } from './more-sheet.tsx'
import { PartSheet } from './part-sheet.tsx'
import { PlainSheet } from './plain-sheet.tsx'
import { quantityEntry } from './quantity-entry.ts'
import { PlaceSheet, placeNames, ReadingSheet } from './reading-sheet.tsx'
import type { Recorder, Said } from './recorder.ts'
import { aspectTitles, type SheetRoute } from './sheet-route.ts'
import { SignSheet } from './sign-sheet.tsx'
import { SurfaceSheet } from './surface-sheet.tsx'
import { TurnSheet } from './turn-sheet.tsx'

/** The sheet on top of the trail; Back goes to the one before, Close to the strip. */
export function StripSheets(props: {
  recorder: Recorder
  trail: readonly SheetRoute[]
  said: Said | null
  setTrail(trail: readonly SheetRoute[]): void
  /** A part was opened; on the card, the card goes on with it. */
  opened(segment: string, onCard: boolean): void
}) {
  const { recorder, trail, setTrail } = props
  const route = trail.at(-1)
  if (!route) return null
  const back = () => setTrail(trail.slice(0, -1))
  const onCard = trail.some((one) => one.at === 'plain')
  return (
    <Sheet
      over={`Part ${recorder.index + 1}`}
      title={titleOf(recorder.walk, route)}
      close={() => setTrail([])}
      back={trail.length > 1 ? back : undefined}
      said={props.said}
    >
      <Inside
        recorder={recorder}
        route={route}
        onCard={onCard}
        go={(next) => setTrail([...trail, next])}
        done={(opened) => {
          if (opened) props.opened(opened, false)
          else back()
        }}
        next={(opened) => props.opened(opened, true)}
      />
    </Sheet>
  )
}

function Inside(props: {
  recorder: Recorder
  route: SheetRoute
  onCard: boolean
  go(route: SheetRoute): void
  done(opened: string | null): void
  next(opened: string): void
}) {
  const { recorder, route, go } = props
  const done = () => props.done(null)
  switch (route.at) {
    case 'plain':
      return <PlainSheet key={recorder.segment.id} recorder={recorder} go={go} done={props.done} next={props.next} />
    case 'reading':
      return (
        <ReadingSheet
          recorder={recorder}
          holder={route.holder}
          quantity={route.quantity}
          opensNext={!props.onCard}
          done={props.done}
        />
      )
    case 'aspect':
      return <AspectSheet key={route.aspect} recorder={recorder} aspect={route.aspect} go={go} done={done} />
    case 'surface':
      return <SurfaceSheet recorder={recorder} go={go} done={done} />
    case 'sign':
      return <SignSheet recorder={recorder} done={done} />
    case 'turn':
      return <TurnSheet recorder={recorder} go={go} done={done} />
    case 'part':
      return <PartSheet recorder={recorder} done={done} />
    case 'more':
      return <MoreSheet recorder={recorder} go={go} />
    default: {
      const feature = featureAt(recorder.walk, route.feature)
      if (!feature) return <p>This is no longer on the walk. Close, and choose again.</p>
      return route.at === 'place' ? (
        <PlaceSheet recorder={recorder} feature={feature} field={route.field} done={done} />
      ) : (
        <FeatureSheet key={feature.id} recorder={recorder} feature={feature} go={go} done={done} />
      )
    }
  }
}

function featureAt(walk: Walk, id: string): Feature | undefined {
  return walk.segments.flatMap((one) => [...one.features, ...(one.turn ? [one.turn] : [])]).find((one) => one.id === id)
}

function titleOf(walk: Walk, route: SheetRoute): string {
  switch (route.at) {
    case 'plain':
      return 'plain stretch'
    case 'reading':
      return quantityEntry(walk, route.holder, route.quantity)?.short ?? route.quantity
    case 'place':
      return placeNames[route.field]
    case 'feature': {
      const feature = featureAt(walk, route.feature)
      return feature ? featureName(feature) : 'gone'
    }
    case 'aspect':
      return aspectTitles[route.aspect].title.toLowerCase()
    case 'sign':
      return 'end sign and shoreline'
    case 'part':
      return 'name, who leads, zone'
    case 'more':
      return 'more'
    default:
      return route.at
  }
}
