/**
 * The life of the process. Started by a script of ours, the server ends with it, so that a killed start leaves nothing
 * behind that holds the port; and it gives its connections back when it is told to stop.
 */
export default defineNitroPlugin((nitro) => {
  // Read now, so that a wrong environment stops the start and not the first request.
  settings()
  // At once: whoever would wait for an orderly end is gone, and what was not committed was not answered either.
  process.once('disconnect', () => process.kill(process.pid, 'SIGKILL'))
  nitro.hooks.hook('close', () => useDatabase().close())
})
