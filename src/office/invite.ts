import { generate } from 'lean-qr'

/**
 * An invitation in lines for a terminal: the code, the address with the code behind the # (which no server log sees), and
 * the same as a picture for a phone's camera.
 */
export function invitation(origin: string, name: string, code: string, expires: string): string[] {
  const address = `${origin}/enrol#${code}`
  const picture = generate(address).toString({ on: '██', off: '  ', padX: 2, padY: 1 })
  return [
    `One-time code for ${name}: ${code.replace(/(....)(?=.)/g, '$1-')}   (one use, until ${expires})`,
    address,
    picture,
  ]
}
