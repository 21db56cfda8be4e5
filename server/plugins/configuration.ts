/**
 * Nitro would make each request its own copy of the configuration and ask the environment for every key of it, some three
 * hundred. The environment of a running process does not change, so all requests share the one read at its start.
 */
export default defineNitroPlugin((nitro) => {
  const shared = useRuntimeConfig()
  nitro.hooks.hook('request', (event) => {
    event.context.nitro = { ...event.context.nitro, runtimeConfig: shared } as typeof event.context.nitro
  })
})
