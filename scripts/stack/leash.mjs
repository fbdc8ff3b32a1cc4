// Loaded first in every process that the start command makes (`node --import`): when the parent is gone, however it
// ended, the channel between the two closes and the child ends as if it had been asked to.
process.on("disconnect", () => process.kill(process.pid, "SIGTERM"))
process.channel?.unref()
