import { hashPassword, verifyPassword } from '#imports'
import { meContract, signInContract } from '#shared/contracts/me'
import { describeMe } from '~~/server/services/me'
import { signIn } from '~~/server/services/sign-in'
import { anyone } from '~~/server/utils/access'
import { addressOf } from '~~/server/utils/address'
import { route } from '~~/server/utils/route'
import { rememberVisitor } from '~~/server/utils/visitor'

let nobody: Promise<string> | undefined
const passwords = {
  verify: verifyPassword,
  hashOfNobody: () => nobody ??= hashPassword('the password of nobody'),
}

/** Opens a session and sets its cookie. */
export default route({
  summary: 'Sign in',
  access: anyone,
  input: signInContract,
  answer: meContract,
  async handle({ event, input }) {
    const { visitor, session } = await signIn(input.email, input.password, addressOf(event), passwords)
    await rememberVisitor(event, visitor, session)
    return describeMe(visitor)
  },
})
