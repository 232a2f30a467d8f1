import type { Assessment, WalkResult } from '../../judge/result.ts'
import type { Survey } from '../../record/survey.ts'
import type { TeamCard } from '../../record/team-card.ts'
import { clientOutline } from './client.ts'
import { fileOutline } from './file.ts'
import { receptionOutline } from './reception.ts'
import { type Scope, type SheetOptions, scopeOf } from './scope.ts'
import type { Outline, Reader, Refusal, Section } from './tree.ts'
import { validUntil } from './valid-until.ts'
import { venueOutline } from './venue.ts'

/**
 * The one source of every form of a sheet. `team`: the card judged with, where it is not the survey's own.
 * A Refusal where the reader may not have one yet; throws where the result belongs to another survey.
 */
export function outline(
  survey: Survey,
  walk: WalkResult,
  assessment: Assessment,
  reader: Reader,
  options: SheetOptions,
  team?: TeamCard,
): Outline | Refusal {
  const scope = scopeOf(survey, walk, assessment, options, team)
  const written = write[reader](scope, validUntil(scope))
  const draft = options.draft || (reader !== 'client' && isUnfinished(walk))
  return written.kind === 'outline' && draft ? markDraft(written) : written
}

/** Something was never answered. A client is given no part of such a walk; anybody else's sheet says that it is a draft. */
function isUnfinished(walk: WalkResult): boolean {
  return walk.missing.length > 0 || walk.segments.length === 0 || walk.segments.some((one) => one.missing.length > 0)
}

const write: Record<Reader, (scope: Scope, goodUntil: string | null) => Outline | Refusal> = {
  client: clientOutline,
  venue: venueOutline,
  file: fileOutline,
  reception: receptionOutline,
}

/** Every heading says it, so that no page and no part passes for finished. */
function markDraft(outline: Outline): Outline {
  const marked = (section: Section): Section => ({
    ...section,
    heading: `DRAFT: ${section.heading}`,
    sections: section.sections.map(marked),
  })
  return {
    ...outline,
    draft: true,
    title: `DRAFT: ${outline.title}`,
    heading: `DRAFT: ${outline.heading}`,
    sections: outline.sections.map(marked),
  }
}
