import net from 'node:net';
import { SetupError } from './ground.mjs';

/**
 * Holds the first free loopback port from `first` on until it is released, so that two checkouts
 * that start in the same second do not choose the same one.
 */
export async function reservePort(first, last = first + 199) {
  for (let port = first; port <= last; port++) {
    const held = await hold(port);
    if (held) return { port, release: () => new Promise((resolve) => held.close(resolve)) };
  }
  throw new SetupError(
    first === last
      ? `port ${first} is taken by another program: set PORT to another number`
      : `no free port on 127.0.0.1 from ${first} to ${last}`,
  );
}

export async function freePort(first) {
  const { port, release } = await reservePort(first);
  await release();
  return port;
}

const hold = (port) =>
  new Promise((resolve) => {
    const server = net.createServer((socket) => socket.destroy());
    server.once('error', () => resolve(undefined));
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => resolve(server));
  });
