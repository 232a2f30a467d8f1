import { describe, expect, test } from 'vitest'
import { codeInAddress, officeAddress } from '../../src/app/state/office-address.ts'

const own = 'https://office.example'

describe('the address of the office', () => {
  test.each(['', ' ', own, 'office.example', 'https://office.example/enrol', 'HTTPS://OFFICE.EXAMPLE/'])(
    'is the own one: "%s"',
    (typed) => {
      expect(officeAddress(typed, own)).toEqual({ ok: true, address: own })
    },
  )

  test.each(['https://other.example', 'other.example', 'http://office.example', 'https://office.example:8443'])(
    'is refused when it is another: %s; it says where to open the app',
    (typed) => {
      const read = officeAddress(typed, own)
      expect(read).toMatchObject({ ok: false, what: expect.stringContaining(own) })
      expect(!read.ok && read.whatToDo).toContain(
        `Open ${new URL(typed.includes('//') ? typed : `https://${typed}`).origin} `,
      )
    },
  )

  test.each(['ftp://', 'not an address', 'javascript:alert(1)'])('is refused when it is none: %s', (typed) => {
    expect(officeAddress(typed, own)).toMatchObject({ ok: false, what: expect.stringContaining('is no address') })
  })
})

describe('the code behind the #', () => {
  test('stands alone or is named', () => {
    expect(codeInAddress('#ABCDEFGHJKMN')).toBe('ABCDEFGHJKMN')
    expect(codeInAddress('#code=abcd-efgh-jkmn')).toBe('abcd-efgh-jkmn')
  })

  test.each(['', '#', '#short', '#code=', '#<b>ABCDEFGHJKMN', '#a=ABCDEFGHJKMN'])('is none in "%s"', (fragment) => {
    expect(codeInAddress(fragment)).toBe('')
  })
})
