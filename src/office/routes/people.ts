import { type EnrolReply, roles } from '../../sync/messages.ts'
import { type FastifyInstance, Type } from '../fastify.ts'
import { callerOn } from '../guard.ts'
import { isoOf, type Office } from '../office.ts'
import { notFound, Refusal } from '../refusal.ts'
import { note } from '../repositories/audit.ts'
import {
  accountIn,
  addAccount,
  addCode,
  changeAccount,
  devicesOf,
  peopleOf,
  redeem,
  revoke,
} from '../repositories/people.ts'
import { administrators, anyone, staff } from '../rules.ts'
import { idText, text } from '../shape.ts'
import { transact } from '../sql/transact.ts'

const role = Type.Union(roles.map((one) => Type.Literal(one)))
const ofAccount = { params: Type.Object({ account: idText }) }

/** Invitation by one-time code, devices and their end, roles. */
export function peopleRoutes(app: FastifyInstance, office: Office): void {
  const administrator = { rule: { who: administrators } }

  app.post(
    '/api/enrol',
    {
      config: { rule: anyone, rateLimit: { max: 20, timeWindow: 60_000 } },
      schema: { body: Type.Object({ code: text(40), label: text(200), record: text(200, 0) }) },
    },
    async (request, reply): Promise<EnrolReply> => {
      const now = office.now()
      const { token, caller, branchName } = await redeem(office.db, request.body, now)
      await note(office.db, caller, now, 'device enrolled', null, { label: request.body.label })
      reply.header('cache-control', 'no-store')
      return {
        token,
        account: { id: caller.account, name: caller.name, role: caller.role },
        branch: branchName,
      }
    },
  )

  app.get('/api/me', { config: { rule: { who: staff } } }, async (request) => callerOn(request))

  app.post('/api/me/sign-out', { config: { rule: { who: staff } } }, async (request) => {
    const caller = callerOn(request)
    const now = office.now()
    await transact(office.db, async (tx) => {
      await revoke(tx, caller.branch, caller.device, now)
      await note(tx, caller, now, 'signed out', null)
    })
    return { signedOut: true }
  })

  app.get('/api/people', { config: administrator }, async (request) => {
    const { branch } = callerOn(request)
    return { people: await peopleOf(office.db, branch), devices: await devicesOf(office.db, branch) }
  })

  app.post(
    '/api/people',
    { config: administrator, schema: { body: Type.Object({ name: text(200), role }) } },
    async (request) => {
      const caller = callerOn(request)
      const { name, role } = request.body
      const now = office.now()
      return transact(office.db, async (tx) => {
        const account = await addAccount(tx, caller.branch, name, role, now)
        const code = await addCode(tx, account, caller.account, now)
        await note(tx, caller, now, 'person invited', null, { account, name, role })
        return { account, ...code }
      })
    },
  )

  app.post('/api/people/:account/codes', { config: administrator, schema: ofAccount }, async (request) => {
    const caller = callerOn(request)
    const { account } = request.params
    const now = office.now()
    const person = await accountIn(office.db, caller.branch, account)
    if (!person) throw notFound('This person')
    if (person.left_at !== null)
      throw new Refusal(409, 'left', `${person.name} has left.`, 'Invite them as a new person.')
    return transact(office.db, async (tx) => {
      const code = await addCode(tx, account, caller.account, now)
      await note(tx, caller, now, 'code made', null, { account })
      return code
    })
  })

  app.post(
    '/api/people/:account/role',
    { config: administrator, schema: { ...ofAccount, body: Type.Object({ role }) } },
    async (request) => {
      const caller = callerOn(request)
      const { account } = request.params
      if (account === caller.account)
        throw new Refusal(409, 'yourself', 'Nobody changes their own role.', 'Ask another administrator.')
      const now = office.now()
      await transact(office.db, async (tx) => {
        if (!(await changeAccount(tx, caller.branch, account, { role: request.body.role })))
          throw notFound('This person')
        await note(tx, caller, now, 'role changed', null, { account, role: request.body.role })
      })
      return { changed: true }
    },
  )

  app.post('/api/people/:account/leave', { config: administrator, schema: ofAccount }, async (request) => {
    const caller = callerOn(request)
    const { account } = request.params
    if (account === caller.account)
      throw new Refusal(409, 'yourself', 'Nobody lets themselves go.', 'Ask another administrator.')
    const now = office.now()
    await transact(office.db, async (tx) => {
      if (!(await changeAccount(tx, caller.branch, account, { left_at: isoOf(now) }))) throw notFound('This person')
      await note(tx, caller, now, 'person left', null, { account })
    })
    return { left: true }
  })

  app.post(
    '/api/devices/:device/revoke',
    { config: administrator, schema: { params: Type.Object({ device: idText }) } },
    async (request) => {
      const caller = callerOn(request)
      const now = office.now()
      await transact(office.db, async (tx) => {
        if (!(await revoke(tx, caller.branch, request.params.device, now))) throw notFound('This device')
        await note(tx, caller, now, 'device revoked', null, { device: request.params.device })
      })
      return { revoked: true }
    },
  )
}
