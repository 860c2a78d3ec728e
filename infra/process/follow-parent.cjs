'use strict';
// Loaded before a service: when whoever started it is gone (even by SIGKILL, when nobody can say
// goodbye), the channel between them closes, and the service ends in good order too.
if (process.channel) {
  process.channel.unref();
  process.on('disconnect', () => process.kill(process.pid, 'SIGTERM'));
}
