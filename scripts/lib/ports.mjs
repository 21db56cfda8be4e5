import { createServer } from 'node:net'

/**
 * A port nobody listens on at this moment.
 * @param {string} [host]
 * @param {number} [port] 0: any
 * @returns {Promise<number>}
 */
export function findFreePort(host = '127.0.0.1', port = 0) {
  return new Promise((resolve, reject) => {
    const server = createServer()
    server.once('error', reject)
    server.listen({ host, port, exclusive: true }, () => {
      const address = server.address()
      server.close(() => resolve(typeof address === 'object' && address ? address.port : port))
    })
  })
}

/** @param {string} host @param {number} port */
export function isPortFree(host, port) {
  return findFreePort(host, port).then(() => true, () => false)
}
