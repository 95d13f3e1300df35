import { randomBytes, scrypt } from 'node:crypto'

/** The cost of nuxt-auth-utils' scrypt driver; its `verifyPassword` reads what stands here. */
const COST = { N: 16_384, r: 8, p: 1 }
const HASH_BYTES = 64

function derive(password: string, salt: Buffer): Promise<Buffer> {
  return new Promise((resolve, reject) => {
    scrypt(password, salt, HASH_BYTES, COST, (error, key) => error ? reject(error) : resolve(key))
  })
}

const unpadded = (bytes: Buffer) => bytes.toString('base64').replace(/=+$/, '')

/** scrypt in PHC form, for the seed and commands that run without Nitro. */
export async function hashPasswordPlain(password: string): Promise<string> {
  const salt = randomBytes(16)
  const key = await derive(password, salt)
  return `$scrypt$n=${COST.N},r=${COST.r},p=${COST.p}$${unpadded(salt)}$${unpadded(key)}`
}
