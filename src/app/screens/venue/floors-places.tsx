import { useState } from 'preact/hooks'
import { addFloor, addPlace, movePlace, setPlaceField } from '../../../record/operations/venue.ts'
import type { Place, SurveyView } from '../../../record/survey.ts'
import { parseQuantity } from '../../../units/parse.ts'
import { Adder } from '../../components/adder.tsx'
import { SelectField } from '../../components/field.tsx'
import { SavedText } from '../../components/saved-text.tsx'
import type { Writer } from './writer.ts'

/** Floors, and the places that walks lead from and to. */
export function FloorsAndPlaces({ writer, view }: { writer: Writer; view: SurveyView }) {
  return (
    <div class="stack">
      <h3>Floors</h3>
      {view.floors.length === 0 ? (
        <p>None named yet.</p>
      ) : (
        <ul class="plain-list">
          {view.floors.map((floor) => (
            <li key={floor.id}>{floor.name}</li>
          ))}
        </ul>
      )}
      <Adder
        label="Name of another floor"
        keyWord="Add the floor"
        add={(name) =>
          writer.write(
            (log) => addFloor(log, { id: writer.session.newId('floor'), name, level: view.floors.length }),
            `floor ${name}`,
          )
        }
      />
      <h3>Places</h3>
      {view.places.length === 0 && <p>None named yet.</p>}
      {view.places.map((place) => (
        <details key={place.id}>
          <summary>{place.name}</summary>
          <PlaceForm writer={writer} view={view} place={place} />
        </details>
      ))}
      <Adder
        label="Name of another place"
        keyWord="Add the place"
        add={(name) =>
          writer.write(
            (log) =>
              addPlace(log, {
                id: writer.session.newId('place'),
                name,
                ...(view.floors[0] ? { floor: view.floors[0].id } : {}),
              }),
            `place ${name}`,
          )
        }
      />
    </div>
  )
}

function PlaceForm({ writer, view, place }: { writer: Writer; view: SurveyView; place: Place }) {
  const [trouble, setTrouble] = useState<string | null>(null)
  const move = (axis: 'x' | 'y', text: string) => {
    const read = parseQuantity(text, { quantity: 'length', unit: 'm', signed: true })
    if (!read.ok) {
      setTrouble('Give metres on the plan, for example 12.5.')
      return false
    }
    setTrouble(null)
    const at = { x: place.x ?? 0, y: place.y ?? 0, [axis]: read.value }
    return writer.write((log) => movePlace(log, place.id, at), `${place.name} on the plan`)
  }
  return (
    <div class="stack">
      <SavedText
        label="Name"
        value={place.name}
        save={(name) =>
          name.trim() !== '' &&
          writer.write((log) => setPlaceField(log, place.id, 'name', name.trim()), `name ${name.trim()}`)
        }
      />
      {view.floors.length > 0 && (
        <SelectField
          label="Floor"
          value={place.floor ?? ''}
          change={(floor) =>
            void writer.write(
              (log) => setPlaceField(log, place.id, 'floor', floor || undefined),
              `${place.name}: floor`,
            )
          }
          choices={view.floors.map((floor) => ({ value: floor.id, label: floor.name }))}
          open="Not said"
        />
      )}
      <SavedText
        label="Right on the plan"
        unit="m"
        value={place.x === undefined ? '' : String(place.x)}
        save={(text) => move('x', text)}
        trouble={trouble}
      />
      <SavedText
        label="Up on the plan"
        unit="m"
        value={place.y === undefined ? '' : String(place.y)}
        save={(text) => move('y', text)}
      />
    </div>
  )
}
