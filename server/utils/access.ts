import type { H3Event } from 'h3'
import { instrumentRight } from '~~/server/services/instruments'
import { jobRight } from '~~/server/services/jobs'
import { mayEdit, projectRight } from '~~/server/services/projects'
import { ServiceError } from '~~/server/services/errors'
import type { Visitor } from '~~/server/services/sessions'
import { projectHolding, type Thing } from '~~/server/services/whereabouts'
import { visitorOf } from './visitor'

/** Who may call a route. The name stands in the access table; the sentence in the API's description. */
export interface AccessRule<Person extends Visitor | null = Visitor | null> {
  name: string
  sentence: string
  /** Lets the caller in or refuses: 401 signed out, 404 what one may not see, 403 what one may see but not do. */
  admit: (event: H3Event, params: Record<string, string>) => Promise<Person>
}

async function signedInVisitor(event: H3Event): Promise<Visitor> {
  const visitor = await visitorOf(event)
  if (!visitor) throw new ServiceError('signed-out', 'This needs an account. Sign in, then try again.')
  return visitor
}

export const nowhere = () => new ServiceError('not-found', 'There is nothing at this address, or it is not yours to see.')

async function admitToProject(visitor: Visitor, project: string | null, mustEdit: boolean) {
  const role = project && await projectRight(visitor.id, project)
  if (!role) throw nowhere()
  if (mustEdit && !mayEdit(role)) {
    throw new ServiceError('forbidden', 'You read this project but do not change it. Ask its owner to make you an editor.')
  }
  return visitor
}

export const anyone: AccessRule = {
  name: 'anyone',
  sentence: 'Anyone, without an account.',
  admit: async () => null,
}

export const signedIn: AccessRule<Visitor> = {
  name: 'signedIn',
  sentence: 'Anyone with an account.',
  admit: signedInVisitor,
}

export const projectMember: AccessRule<Visitor> = {
  name: 'projectMember',
  sentence: 'Members of the project.',
  admit: async (event, params) => admitToProject(await signedInVisitor(event), params.project!, false),
}

export const projectEditor: AccessRule<Visitor> = {
  name: 'projectEditor',
  sentence: 'Owners and editors of the project.',
  admit: async (event, params) => admitToProject(await signedInVisitor(event), params.project!, true),
}

export const projectOwner: AccessRule<Visitor> = {
  name: 'projectOwner',
  sentence: 'Owners of the project.',
  async admit(event, params) {
    const visitor = await signedInVisitor(event)
    const role = await projectRight(visitor.id, params.project!)
    if (!role) throw nowhere()
    if (role !== 'owner') throw new ServiceError('forbidden', 'Only an owner of the project changes this.')
    return visitor
  },
}

/** A rule for what lies inside a project, named by the thing in the address. */
function inside(thing: Thing, right: 'Reader' | 'Editor'): AccessRule<Visitor> {
  return {
    name: `${thing}${right}`,
    sentence: `${right === 'Reader' ? 'Members' : 'Owners and editors'} of the project that holds the ${thing}.`,
    async admit(event, params) {
      const visitor = await signedInVisitor(event)
      return admitToProject(visitor, await projectHolding(visitor.id, thing, params[thing]!), right === 'Editor')
    },
  }
}

export const seriesReader = inside('series', 'Reader')
export const seriesEditor = inside('series', 'Editor')
export const campaignReader = inside('campaign', 'Reader')
export const campaignEditor = inside('campaign', 'Editor')
export const batchReader = inside('batch', 'Reader')
export const batchEditor = inside('batch', 'Editor')
export const sampleEditor = inside('sample', 'Editor')
export const stockEditor = inside('stock', 'Editor')
export const importReader = inside('import', 'Reader')
export const importEditor = inside('import', 'Editor')

export const instrumentEditor: AccessRule<Visitor> = {
  name: 'instrumentEditor',
  sentence: 'Members of the lab that owns the instrument.',
  async admit(event, params) {
    const visitor = await signedInVisitor(event)
    const right = await instrumentRight(visitor.id, params.instrument!)
    if (!right) throw nowhere()
    if (right === 'see') throw new ServiceError('forbidden', 'Only members of its lab change an instrument.')
    return visitor
  },
}

function jobRule(name: string, sentence: string, wanted: 'own' | 'see'): AccessRule<Visitor> {
  return {
    name,
    sentence,
    async admit(event, params) {
      const visitor = await signedInVisitor(event)
      const right = await jobRight(visitor.id, params.job!)
      if (!right) throw nowhere()
      if (wanted === 'own' && right !== 'own') throw new ServiceError('forbidden', 'Only the person who started a job can stop it.')
      return visitor
    },
  }
}

export const jobWatcher = jobRule('jobWatcher', 'The person who started the job and the members of its project.', 'see')
export const jobOwner = jobRule('jobOwner', 'The person who started the job.', 'own')
