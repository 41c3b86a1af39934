import net from 'node:net';
import { SetupError } from './ground.mjs';

const canBind = (port) =>
  new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', () => resolve(false));
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => server.close(() => resolve(true)));
  });

/** The first free loopback port from `first` on, so that two checkouts run side by side. */
export async function freePort(first, taken = new Set()) {
  for (let port = first; port < first + 200; port++)
    if (!taken.has(port) && (await canBind(port))) {
      taken.add(port);
      return port;
    }
  throw new SetupError(`no free port on 127.0.0.1 from ${first} to ${first + 199}`);
}
