import { v7 } from 'uuid'
import { asOwner } from './database'
import type { signedInAs } from './server'

type Agent = Awaited<ReturnType<typeof signedInAs>>

/** A project of its own with one campaign, so that a test leaves the demonstration as it is. */
export async function newCampaign(owner: Agent, name: string, campaign: object = {}) {
  const project: string = (await owner.post('/api/v1/projects').send({ name }).expect(201)).body.id
  const made = (await owner.post(`/api/v1/projects/${project}/campaigns`).send({ name: 'spring', ...campaign }).expect(201)).body as { id: string, lab: { id: string } }
  return { project, campaign: made.id, lab: made.lab.id }
}

type Salt = readonly [formula: string, name: string, anion: string, cation: string]

/** An empty series, as somebody finds it who has not measured yet. */
export async function newSeries({ project, campaign }: { project: string, campaign: string }, salt: Salt = ['NaSCN', 'sodium thiocyanate', 'SCN^-', 'Na^+']): Promise<string> {
  const id = v7()
  await asOwner(client => client.query(
    'insert into series (id, project_id, campaign_id, salt_formula, salt_name, anion, cation) values ($1, $2, $3, $4, $5, $6, $7)', [id, project, campaign, ...salt]))
  return id
}

/** Invented cloud points that bind and turn: concentration in mol/L, cloud point in °C. */
export const thiocyanate = [[0.02, 31.25], [0.05, 31.54], [0.12, 31.93], [0.2, 32.07], [0.3, 32.09], [0.4, 31.86], [0.6, 31.47], [0.8, 30.81], [1, 30.17]] as const
