import { defineEventHandler } from 'h3'
import { nowhere } from '~~/server/utils/access'
import { sendProblem } from '~~/server/utils/problem'

/** What no route answers: a problem, not the page for people. */
export default defineEventHandler(event => sendProblem(event, nowhere()))
