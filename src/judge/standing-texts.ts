import type { CodePack } from '../standards/pack.ts'
import type { Team } from './team.ts'

/** What every result says, whatever its verdict. */
export function standingTexts({ card }: Team, pack: CodePack, on: string, demo: boolean): string[] {
  return [
    `Judged for ${card.name}, team card ${card.revision} of ${card.date}, as on ${on}, with ${pack.name}.`,
    'Holds for this team, leash, hours and conditions only.',
    'Local codes and licensed orientation and mobility practice take precedence.',
    'A qualified person must walk the route, and the client must walk it with a helper, before anyone relies on it.',
    'This certifies nothing. The robot can fail: carry the cane.',
    'After any stop the leash may lie on the floor: stand still, do not step forward.',
    ...(demo ? ['An invented venue, for trying the program.'] : []),
  ]
}
