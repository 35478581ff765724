// Loaded into the web and worker processes that `npm start` makes: when the starter is killed outright the channel
// to it closes, and they end as if asked to.
if (process.channel) {
  process.channel.unref();
  process.on("disconnect", () => process.kill(process.pid, "SIGTERM"));
}
