import { z } from 'zod'
import { ProjectRoleSchema } from '#shared/schemas/api'
import type { Db } from './client'
import { hashPasswordPlain } from './passwords'
import { insertAccount } from './queries/accounts'

export const NewAccountSchema = z.strictObject({
  email: z.email('The e-mail is not an address, for example name@practice.example.').max(254),
  name: z.string().trim().min(1, 'A name is needed.').max(120),
  practice: z.string().trim().min(1).max(120),
  role: ProjectRoleSchema.nullable(),
  isAdministrator: z.boolean(),
  password: z.string().min(12, 'The password needs 12 characters or more.').max(200),
})

/**
 * Adds an account; its practice is made when there is none of that name.
 * @throws an Error with a sentence when a field is unsuited or the e-mail is taken
 */
export async function createAccount(db: Db, wish: z.input<typeof NewAccountSchema>): Promise<void> {
  const checked = NewAccountSchema.safeParse(wish)
  if (!checked.success) throw new Error(checked.error.issues.map(issue => issue.message).join(' '))
  const { practice, password, ...account } = checked.data
  const passwordHash = await hashPasswordPlain(password)
  await db.transaction().execute(async (trx) => {
    const email = account.email.toLowerCase()
    const taken = await trx.selectFrom('accounts').select('id').where('email', '=', email).executeTakeFirst()
    if (taken) throw new Error(`There is an account of ${email} already.`)
    const known = await trx.selectFrom('practices').select('id').where('name', '=', practice).executeTakeFirst()
    const { id } = known
      ?? await trx.insertInto('practices').values({ name: practice }).returning('id').executeTakeFirstOrThrow()
    await insertAccount(trx, { ...account, email, practiceId: id, passwordHash })
  })
}
