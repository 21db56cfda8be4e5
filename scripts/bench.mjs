#!/usr/bin/env node
import { execFile } from 'node:child_process'
import { mkdirSync, writeFileSync } from 'node:fs'
import { cpus, totalmem } from 'node:os'
import { join, resolve } from 'node:path'
import { fileURLToPath } from 'node:url'
import { parseArgs, promisify } from 'node:util'
import { chooseRoutes, openSession } from './lib/benchDemo.mjs'
import { bringUpBench } from './lib/benchServers.mjs'
import { isReviewQuickEnough, measureReview, reviewTableOf } from './lib/benchReview.mjs'
import { timeStarts } from './lib/benchStart.mjs'
import { domainTableOf, isQuickEnough, meetsTarget, tableOf } from './lib/benchTable.mjs'
import { createKeeper, stopOnSignals } from './lib/keeper.mjs'
import { Refusal } from './lib/refusal.mjs'
import { makeTestFolder } from './lib/testFolder.mjs'

const root = resolve(fileURLToPath(import.meta.url), '../..')
const keeper = createKeeper()
const say = line => console.log(line)
const connections = 20
const rounds = 2

function readOptions() {
  const { values } = parseArgs({ options: {
    'write': { type: 'boolean', default: false },
    'start': { type: 'boolean', default: false },
    'seconds': { type: 'string', default: '8' },
    'only': { type: 'string' },
    'cpu-prof': { type: 'string' },
  } })
  const seconds = Number(values.seconds)
  if (!(seconds >= rounds)) throw new Refusal(`--seconds has to be a number from ${rounds} on.`)
  return { ...values, seconds }
}

async function measureRoutes({ folder, options }) {
  const profile = options['cpu-prof']
  const { program, reference, owner } = await bringUpBench({
    root, folder, keeper, say, nodeOptions: profile ? ['--cpu-prof', `--cpu-prof-dir=${resolve(profile)}`] : [],
  })
  const cookie = await openSession(program.address, owner)
  const routes = await chooseRoutes({ address: program.address, cookie })
  const wanted = routes.filter(({ name }) => !options.only || name === options.only)
  const references = {
    json: { name: 'bare route, one select', kind: 'reference', pid: reference.pid, url: `${reference.address}/api/one` },
    page: { name: 'minimal page', kind: 'reference', pid: reference.pid, url: `${reference.address}/` },
  }
  const targets = [references.json, references.page, ...wanted.map(({ path, headers, ...route }) => ({ ...route, pid: program.pid, url: `${program.address}${path}`, headers: { cookie, ...headers } }))]
  const { measuresOf, pressInTurn } = await import('./lib/benchLoad.mjs')
  say(`Measuring ${targets.length} routes, ${options.seconds} s each …`)
  const loads = await pressInTurn(targets, { connections, seconds: options.seconds, rounds, onRound: round => say(`  round ${round} of ${rounds}`) })
  const measured = new Map([...loads].map(([target, load]) => [target, measuresOf(load)]))
  return targets.map((target) => {
    const measures = measured.get(target)
    return { ...target, measures, ratio: measures.perSecond / measured.get(references[target.against] ?? target).perSecond }
  })
}

async function measureDomain() {
  const { stdout } = await promisify(execFile)(process.execPath, ['--import', 'tsx', join(root, 'bench/domain.ts')], { cwd: root })
  return JSON.parse(stdout)
}

const describeMachine = () =>
  `${cpus().length} × ${cpus()[0]?.model.trim() ?? 'unknown processor'}, ${Math.round(totalmem() / 2 ** 30)} GiB, Node ${process.version}, ${new Date().toISOString().slice(0, 10)}`

async function runBench() {
  const options = readOptions()
  const folder = makeTestFolder(root, keeper)
  const domain = await measureDomain()
  // The whole by default; `--only review` is that alone, `--only` with a route leaves the review out.
  const reviewed = !options.only || options.only === 'review' ? await measureReview({ root, folder, keeper, say }) : undefined
  const rows = options.only === 'review' ? [] : await measureRoutes({ folder, options })
  const starts = options.start ? await timeStarts({ root, folder, keeper }) : undefined
  const missed = rows.filter(row => meetsTarget(row) === false)
  const report = [
    '# Measured', '', describeMachine(), '',
    `${connections} connections, ${options.seconds} s a route in ${rounds} rounds by turns, on the demo; client, servers and database on the same machine. Ratio: requests a second held against the reference of the same run. Processor: the server's own time an answer, without the database's. Made anew: asked so that no kept answer is used, as after a change.`, '',
    ...(rows.length > 0 ? [tableOf(rows), ''] : []), domainTableOf(domain),
    ...(reviewed ? ['', reviewTableOf(reviewed)] : []),
    ...(starts ? ['', `npm start: first ${starts.firstSeconds.toFixed(1)} s on an empty data folder, second ${starts.secondSeconds.toFixed(1)} s.`] : []),
  ].join('\n')
  say(`\n${report}\n`)
  if (options.write) {
    mkdirSync(join(root, 'tests/bench'), { recursive: true })
    writeFileSync(join(root, 'tests/bench/latest.md'), `${report}\n`)
  }
  return missed.length === 0 && domain.every(isQuickEnough) && (!reviewed || reviewed.nights.every(isReviewQuickEnough))
}

stopOnSignals(keeper)
let isGood = false
try {
  isGood = await runBench()
}
catch (error) {
  if (!keeper.isStopping()) console.error(error instanceof Refusal ? `\n${error.message}` : error)
}
if (!keeper.isStopping()) {
  await keeper.stopAll()
  process.exit(isGood ? 0 : 1)
}
