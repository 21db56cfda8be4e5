import { createEvent } from 'h3'
import { IncomingMessage, ServerResponse } from 'node:http'
import { Socket } from 'node:net'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { remoteAddress } from '../../../server/utils/attempts'

function eventFrom(peer: string, forwarded?: string) {
  const socket = new Socket()
  Object.defineProperty(socket, 'remoteAddress', { value: peer })
  const request = new IncomingMessage(socket)
  if (forwarded) request.headers['x-forwarded-for'] = forwarded
  return createEvent(request, new ServerResponse(request))
}

afterEach(() => vi.unstubAllEnvs())

describe('where a request comes from', () => {
  it('is the peer, whatever the request claims', () => {
    expect(remoteAddress(eventFrom('203.0.113.7', '198.51.100.1'))).toBe('203.0.113.7')
  })

  it('is what our own proxy added last, when there is one', () => {
    vi.stubEnv('TRUST_PROXY', '1')
    expect(remoteAddress(eventFrom('10.0.0.2', '192.0.2.66, 203.0.113.7'))).toBe('203.0.113.7')
  })

  it('is the same for one IPv4 address, however it is written', () => {
    expect(remoteAddress(eventFrom('::ffff:203.0.113.7'))).toBe('203.0.113.7')
  })

  it('is the /64 of an IPv6 address, which one subscriber has whole (RFC 6177)', () => {
    expect(remoteAddress(eventFrom('2001:db8:1:2:3:4:5:6'))).toBe('2001:db8:1:2::/64')
    expect(remoteAddress(eventFrom('2001:0db8:1:2::9'))).toBe('2001:db8:1:2::/64')
    expect(remoteAddress(eventFrom('2001:db8::1'))).toBe('2001:db8:0:0::/64')
    expect(remoteAddress(eventFrom('2001:db8:1:3::9'))).not.toBe('2001:db8:1:2::/64')
  })
})
