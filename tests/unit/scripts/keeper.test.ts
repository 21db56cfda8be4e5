import { spawn } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join, resolve } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { afterAll, expect, test } from 'vitest'
import { isAlive, startChild } from '../../../scripts/lib/children.mjs'
import { createKeeper } from '../../../scripts/lib/keeper.mjs'
import { tryLock, withLock } from '../../../scripts/lib/lock.mjs'

const folder = mkdtempSync(join(tmpdir(), 'lathkey-keeper-'))
afterAll(() => rmSync(folder, { recursive: true, force: true }))

const forever = 'setInterval(() => {}, 1000)'

async function becomesDead(pid: number) {
  for (let attempt = 0; attempt < 100 && isAlive(pid); attempt += 1) await wait(50)
  return !isAlive(pid)
}

test('what was started last is stopped first, and one failure does not keep the rest running', async () => {
  const keeper = createKeeper()
  const stopped: string[] = []
  keeper.add(() => void stopped.push('first'))
  keeper.add(() => Promise.reject(new Error('on purpose')))
  keeper.add(() => void stopped.push('last'))
  await Promise.all([keeper.stopAll(), keeper.stopAll()])
  expect(stopped).toEqual(['last', 'first'])
})

test('a program that is running ends with the keeper', async () => {
  const keeper = createKeeper()
  const { child, exited } = keeper.start(process.execPath, ['-e', forever], { stdio: 'ignore' })
  expect(isAlive(child.pid as number)).toBe(true)
  await keeper.stopAll()
  expect(await exited).toMatchObject({ signal: 'SIGTERM' })
})

test('a program that ignores the polite signal is ended after its grace', async () => {
  const { child, exited, stop } = startChild(process.execPath, ['-e', `process.on('SIGTERM', () => {}); console.log('up'); ${forever}`], { stdio: ['ignore', 'pipe', 'ignore'], graceMs: 200 })
  await new Promise(resolve => child.stdout?.once('data', resolve))
  await stop()
  expect(await exited).toMatchObject({ signal: 'SIGKILL' })
})

test('children of a child are ended with it', async () => {
  const parent = `const c = require('child_process').spawn(process.execPath, ['-e', ${JSON.stringify(forever)}], { stdio: 'ignore' }); console.log(c.pid); ${forever}`
  const { child, stop } = startChild(process.execPath, ['-e', parent], { stdio: ['ignore', 'pipe', 'ignore'] })
  const grandchild = Number(await new Promise<string>(resolve => child.stdout?.once('data', data => resolve(String(data)))))
  expect(isAlive(grandchild)).toBe(true)
  await stop()
  expect(await becomesDead(grandchild)).toBe(true)
})

test('a program ends with us even when we are killed outright', async () => {
  const children = resolve(import.meta.dirname, '../../../scripts/lib/children.mjs')
  const script = join(folder, 'holder.mjs')
  writeFileSync(script, `import { startChild } from ${JSON.stringify(children)}\nconst { child } = startChild(process.execPath, ['-e', ${JSON.stringify(forever)}], { stdio: 'ignore' })\nsetTimeout(() => console.log(child.pid), 300)\n`)
  const holder = spawn(process.execPath, [script], { stdio: ['ignore', 'pipe', 'inherit'] })
  const pid = Number(await new Promise<string>(resolve => holder.stdout.once('data', data => resolve(String(data)))))
  holder.kill('SIGKILL')
  expect(await becomesDead(pid)).toBe(true)
})

test('a finished program answers its code; one that does not exist throws', async () => {
  const keeper = createKeeper()
  expect(await keeper.run(process.execPath, ['-e', 'process.exit(3)'], { stdio: 'ignore' })).toBe(3)
  const outcome = await keeper.run('/nonexistent/program', [], { stdio: 'ignore' }).catch(() => 'thrown')
  expect(outcome).not.toBe(0)
})

test('nothing is started once stopping has begun', async () => {
  const keeper = createKeeper()
  await keeper.stopAll()
  expect(() => keeper.start(process.execPath, ['-e', forever])).toThrow('stopping')
  await expect(keeper.run(process.execPath, ['-e', forever])).rejects.toThrow('stopping')
})

test('a lock is held by one, and free again when given back', () => {
  const file = join(folder, 'a.lock')
  const release = tryLock(file)
  expect(release).toBeTypeOf('function')
  expect(tryLock(file)).toBeUndefined()
  release?.()
  expect(tryLock(file)).toBeTypeOf('function')
})

test('a lock whose holder died counts as free', async () => {
  const file = join(folder, 'dead.lock')
  const dead = spawn(process.execPath, ['-e', ''], { stdio: 'ignore' })
  await new Promise(resolve => dead.once('exit', resolve))
  writeFileSync(file, String(dead.pid))
  expect(tryLock(file)).toBeTypeOf('function')
})

test('works under one lock run one after the other', async () => {
  const file = join(folder, 'b.lock')
  const seen: string[] = []
  const work = (name: string) => withLock(file, async () => {
    seen.push(`${name} in`)
    await wait(20)
    seen.push(`${name} out`)
  })
  await Promise.all([work('one'), work('two')])
  expect(seen).toHaveLength(4)
  expect(seen[0]?.split(' ')[0]).toBe(seen[1]?.split(' ')[0])
})
