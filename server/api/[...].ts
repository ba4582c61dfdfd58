import { routes } from '#routes'
import { defineEventHandler, setResponseHeader } from 'h3'
import { ServiceError } from '~~/server/services/errors'
import { nowhere } from '~~/server/utils/access'
import { sendProblem } from '~~/server/utils/problem'

/** What no route answers: a problem, not the page for people. */
export default defineEventHandler((event) => {
  const path = event.path.split('?')[0]!
  const methods = routes.filter(one => patternOf(one.path).test(path)).map(one => one.method.toUpperCase())
  if (methods.length === 0) return sendProblem(event, nowhere())
  setResponseHeader(event, 'allow', methods.join(', '))
  return sendProblem(event, new ServiceError('wrong-method', `This address takes ${methods.join(' and ')}, not ${event.method}.`))
})

function patternOf(path: string): RegExp {
  return new RegExp(`^${path.replaceAll('.', '\\.').replace(/\{\w+\}/g, '[^/]+')}$`)
}
