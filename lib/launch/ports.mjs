import net from 'node:net';

/** Whether this machine lets us listen there. */
export function isFree(port, host = '127.0.0.1') {
  return new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', () => resolve(false));
    server.listen({ port, host, exclusive: true }, () => server.close(() => resolve(true)));
  });
}

/** The first free port from `wish` upwards; after a hundred tries whichever the system offers. */
export async function freePort(wish, host = '127.0.0.1') {
  for (let port = wish; port < wish + 100; port += 1) if (await isFree(port, host)) return port;
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', reject);
    server.listen(0, host, () => {
      const { port } = server.address();
      server.close(() => resolve(port));
    });
  });
}
