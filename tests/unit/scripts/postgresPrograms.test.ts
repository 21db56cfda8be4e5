import { chmodSync, mkdirSync, mkdtempSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { afterEach, beforeEach, expect, test } from 'vitest'
import { databaseAccount, prepareDatabaseFolder } from '../../../scripts/lib/account.mjs'
import { choosePrograms, findPostgresPrograms } from '../../../scripts/lib/postgresPrograms.mjs'

let folder: string
beforeEach(() => {
  // Not the temporary folder of this run, which may lie in a closed one.
  folder = mkdtempSync('/tmp/lathkey-programs-')
})
afterEach(() => rmSync(folder, { recursive: true, force: true }))

const isRoot = process.getuid?.() === 0

function install(path: string, names = ['initdb', 'postgres', 'pg_ctl']) {
  mkdirSync(path, { recursive: true })
  for (const name of names) writeFileSync(join(path, name), '', { mode: 0o755 })
}

test('the newest of Debian\'s versions comes first; one that lacks the server does not count', () => {
  install(join(folder, '15/bin'))
  install(join(folder, '17/bin'))
  install(join(folder, '18/bin'), ['pg_ctl'])
  expect(findPostgresPrograms(folder, '').map(({ major }) => major)).toEqual([17, 15])
})

test('programs on the path are found where Debian has none', () => {
  install(join(folder, 'own'))
  expect(findPostgresPrograms(join(folder, 'none'), `/nonexistent:${join(folder, 'own')}`)).toEqual([{ folder: join(folder, 'own'), major: undefined }])
})

test('an existing cluster gets the version it was made with, a new one at least 15', () => {
  const found = [{ folder: '/17', major: 17 }, { folder: '/15', major: 15 }, { folder: '/13', major: 13 }]
  expect(choosePrograms(found, 15)?.folder).toBe('/15')
  expect(choosePrograms(found, undefined)?.folder).toBe('/17')
  expect(choosePrograms([{ folder: '/13', major: 13 }], undefined)).toBeUndefined()
  expect(choosePrograms(found, 16)).toBeUndefined()
})

test('root hands the database to its own account; anybody else runs it as themselves', () => {
  const passwd = join(folder, 'passwd')
  writeFileSync(passwd, 'root:x:0:0::/root:/bin/sh\nnobody:x:65534:65534::/:/bin/false\npostgres:x:101:104::/var/lib/postgresql:/bin/bash\n')
  expect(databaseAccount(passwd)).toEqual(isRoot ? { uid: 101, gid: 104 } : undefined)
})

test('a folder that account can enter is used as asked', () => {
  chmodSync(folder, 0o755)
  const account = databaseAccount()
  const place = prepareDatabaseFolder(join(folder, 'postgres'), account, undefined)
  expect(place).toEqual({ folder: join(folder, 'postgres'), isFallback: false })
  expect(statSync(place.folder).uid).toBe(account?.uid ?? process.getuid?.())
  expect(statSync(place.folder).mode & 0o077).toBe(0)
})

test.runIf(isRoot)('inside a closed folder the database moves to the temporary folder, and is found there again', () => {
  chmodSync(folder, 0o700)
  const account = databaseAccount()
  const place = prepareDatabaseFolder(join(folder, 'postgres'), account, undefined)
  try {
    expect(place.isFallback).toBe(true)
    expect(place.folder.startsWith(folder)).toBe(false)
    expect(statSync(place.folder).uid).toBe(account?.uid)
    expect(prepareDatabaseFolder(join(folder, 'postgres'), account, place.folder)).toEqual(place)
  }
  finally {
    rmSync(place.folder, { recursive: true, force: true })
  }
})

test.runIf(isRoot)('a database that another account made is not taken over', () => {
  mkdirSync(join(folder, 'postgres'))
  expect(() => prepareDatabaseFolder(join(folder, 'postgres'), databaseAccount(), undefined)).toThrow('belongs to another account')
})

test.runIf(isRoot)('a database whose folder was closed afterwards is not replaced by an empty one', () => {
  chmodSync(folder, 0o755)
  prepareDatabaseFolder(join(folder, 'postgres'), databaseAccount(), undefined)
  chmodSync(folder, 0o700)
  expect(() => prepareDatabaseFolder(join(folder, 'postgres'), databaseAccount(), undefined)).toThrow('can no longer enter')
})
