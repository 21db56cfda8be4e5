import type { AddressInfo, Socket } from 'node:net'
import { buffer } from 'node:stream/consumers'
import { setTimeout as wait } from 'node:timers/promises'
import { SMTPServer } from 'smtp-server'
import { meetsMode, type MailBehaviour } from './behaviour'
import type { MessageStore } from './messageStore'

const sizeLimitBytes = 25 * 1024 * 1024

function answer(code: number, text: string) {
  return Object.assign(new Error(text), { responseCode: code })
}

/** A real SMTP server on loopback, without encryption or sign-in. */
export async function listenForMail(port: number, store: MessageStore, behaviour: () => MailBehaviour) {
  const sockets = new Set<Socket>()
  const pause = () => behaviour().mode === 'slow' ? wait(behaviour().slowMs, undefined, { ref: false }) : undefined
  const server = new SMTPServer({
    name: 'fake.lathkey.example', banner: 'Lathkey trial mail', size: sizeLimitBytes, closeTimeout: 200,
    authOptional: true, disabledCommands: ['AUTH', 'STARTTLS'], disableReverseLookup: true, logger: false,
    async onConnect(_session, done) {
      const { mode, recipients } = behaviour()
      if (mode === 'hang') return
      await pause()
      done(mode === 'refuse' && recipients.length === 0 ? answer(421, '4.3.2 not taking mail at the moment') : null)
    },
    async onRcptTo({ address }, _session, done) {
      await pause()
      if (meetsMode(behaviour(), 'refuse', address)) return done(answer(451, '4.3.0 try again later'))
      if (meetsMode(behaviour(), 'bounce', address)) return done(answer(550, '5.1.1 no such mailbox'))
      done()
    },
    async onData(stream, session, done) {
      const raw = await buffer(stream)
      if (stream.sizeExceeded) return done(answer(552, '5.3.4 message too large'))
      await pause()
      const sender = session.envelope.mailFrom ? session.envelope.mailFrom.address : ''
      const recipients = session.envelope.rcptTo.map(({ address }) => address)
      const isDropped = recipients.some(address => meetsMode(behaviour(), 'drop', address))
      await store.add(raw, sender, recipients, !isDropped)
      if (!isDropped) return done(null, 'taken')
      for (const socket of sockets) if (socket.remotePort === session.remotePort) socket.destroy()
    },
  })
  server.on('error', () => { /* a client that went away; nothing to do for a fake */ })
  server.server.on('connection', (socket: Socket) => {
    sockets.add(socket)
    socket.once('close', () => sockets.delete(socket))
  })
  await new Promise<void>((resolve, reject) => {
    server.server.once('error', reject)
    server.listen(port, '127.0.0.1', resolve)
  })
  return {
    url: `smtp://127.0.0.1:${(server.server.address() as AddressInfo).port}`,
    close: () => new Promise<void>((resolve) => {
      server.close(() => resolve())
      for (const socket of sockets) socket.destroy()
    }),
  }
}
