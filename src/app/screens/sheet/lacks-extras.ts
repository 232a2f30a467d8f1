import { extras } from '../../state/extras.ts'
import type { SheetForm } from './forms.ts'

/** True: this form cannot be written on this phone before the offline extras are taken. */
export function lacksExtras(form: SheetForm): boolean {
  return 'order' in form && form.needsExtras && extras.value.kind !== 'here'
}
