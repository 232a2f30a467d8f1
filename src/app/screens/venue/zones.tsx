import { addZone, setZoneField } from '../../../record/operations/venue.ts'
import type { SurveyView, Zone } from '../../../record/survey.ts'
import { Adder } from '../../components/adder.tsx'
import { SelectField } from '../../components/field.tsx'
import { AllowedForm } from './allowed-form.tsx'
import { AnswerItems } from './answer-items.tsx'
import { Observations } from './observations.tsx'
import type { Writer } from './writer.ts'

const items = [
  {
    item: 'signal',
    label: 'Phone signal',
    words: [
      { value: 'yes', label: 'yes' },
      { value: 'none', label: 'none' },
    ],
  },
  {
    item: 'mopped',
    label: 'Floor mopped in the hours judged',
    words: [
      { value: 'no', label: 'no' },
      { value: 'yes', label: 'yes' },
    ],
  },
  {
    item: 'magnet',
    label: 'Strong magnet near (robot forbidden)',
    words: [
      { value: 'no', label: 'no' },
      { value: 'yes', label: 'yes' },
    ],
  },
] as const

const yesNo = [
  { value: 'yes', label: 'yes' },
  { value: 'no', label: 'no' },
] as const

const sides = [
  { field: 'outdoors', label: 'Outdoors' },
  { field: 'nearOutsideDoor', label: 'An outside door is within 10 m' },
] as const

/** Parts of the venue with their surroundings at an hour, and who allows the robot. */
export function Zones({ writer, view }: { writer: Writer; view: SurveyView }) {
  return (
    <div class="stack">
      {view.zones.length === 0 && <p>No zone yet. A walk without one has no answer for crowd, noise and permission.</p>}
      {view.zones.map((zone) => (
        <details key={zone.id}>
          <summary>
            {zone.name}: robot {allowedWords(zone)}
          </summary>
          <ZoneForm writer={writer} zone={zone} />
        </details>
      ))}
      <Adder
        label="Name of another zone"
        keyWord="Add the zone"
        add={(name) => writer.write((log) => addZone(log, { id: writer.session.newId('zone'), name }), `zone ${name}`)}
      />
    </div>
  )
}

function allowedWords(zone: Zone): string {
  const says = zone.words.allowed?.says
  if (zone.words.allowed?.rivals) return 'allowed or not: not agreed'
  return says === undefined || says === 'not-asked' ? 'not asked for' : says
}

function ZoneForm({ writer, zone }: { writer: Writer; zone: Zone }) {
  return (
    <div class="stack">
      <AllowedForm writer={writer} zone={zone} />
      {/* Not said is not "no": an unanswered zone is reckoned wet. */}
      {sides.map(({ field, label }) => (
        <SelectField
          key={field}
          label={label}
          value={zone[field] === undefined ? '' : zone[field] ? 'yes' : 'no'}
          change={(says) =>
            says !== '' &&
            void writer.write(
              (log) => setZoneField(log, zone.id, field, says === 'yes'),
              `${zone.name}, ${label.toLowerCase()}: ${says}`,
            )
          }
          choices={yesNo}
          open="Not answered"
        />
      ))}
      <AnswerItems writer={writer} holder={zone} items={items} />
      <Observations writer={writer} zone={zone} />
    </div>
  )
}
