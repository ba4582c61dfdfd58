import { lock } from './lib/lock.mjs'
import { buildApp, checkNode, installPackages } from './lib/packages.mjs'
import { dataFolder, makeDataFolder } from './lib/places.mjs'
import { isFree } from './lib/ports.mjs'
import { until } from './lib/processes.mjs'
import { withSession } from './lib/session.mjs'
import { webAddress } from './lib/settings.mjs'
import { startStack } from './lib/stack.mjs'
import { StopSentence, runMain } from './lib/stop-sentence.mjs'

/** @type {[string, string][]} */
const ACCOUNTS = [
  ['ines@norrvik.example', 'lead, Norrvik; owner of the project'],
  ['tomas@norrvik.example', 'chemist, Norrvik'],
  ['wren@ostrel.example', 'lead and chemist, Ostrel'],
  ['odile@quaymere.example', 'chemist, Quaymere'],
  ['piet@elsewhere.example', 'collaborator: reads and comments'],
  ['sana@shelf.example', 'curator of the shelf'],
  ['admin@anionary.example', 'admin'],
]

await runMain(async () => {
  const began = Date.now()
  checkNode()
  const data = dataFolder()
  const address = webAddress()
  makeDataFolder(data)
  return withSession(async (session) => {
    const { release, isAfterCrash } = lock(data, 'Anionary')
    session.onEnd(release)
    await checkPort(address, isAfterCrash)
    await installPackages()
    session.checkpoint()
    await buildApp()
    session.checkpoint()
    const stack = await startStack(session, data, address)
    announce(stack.url, (Date.now() - began) / 1000)
    const end = await Promise.race([stack.broken, session.interrupted])
    if (end) throw new StopSentence(`${end}\nEverything else was stopped too.`)
    console.log('\nStopping …')
  })
})

/** @param {import('./lib/settings.mjs').Address} address @param {boolean} isAfterCrash */
async function checkPort({ host, port }, isAfterCrash) {
  if (!Number.isInteger(port) || port < 1 || port > 65_535) throw new StopSentence(`PORT is ${process.env.PORT}: give a number from 1 to 65535.`)
  // After a crash the old web server notices that we are gone and needs a moment to end.
  if (await until(() => isFree(port, host), isAfterCrash ? 10 : 0)) return
  throw new StopSentence(`port ${port} is taken by another program: stop it, or choose another one, for example PORT=${port + 100} npm start.`)
}

/** @param {string} url @param {number} seconds */
function announce(url, seconds) {
  console.log(`\nAnionary is ready after ${seconds.toFixed(1)} s:  ${url}`)
  if (process.env.ANIONARY_DEMO !== '0') {
    console.log('\nDemo accounts (password anionary-demo; all data in them is invented):')
    for (const [mail, role] of ACCOUNTS) console.log(`  ${mail.padEnd(26)}${role}`)
  }
  console.log('\nCtrl-C stops everything.')
}
