import net from 'node:net';
import { SetupProblem } from './say.mjs';

/** Can a server listen on this port of the loopback address? */
export const isFree = (port) =>
  new Promise((resolve) => {
    const server = net.createServer();
    server.once('error', () => resolve(false));
    server.listen(port, '127.0.0.1', () => server.close(() => resolve(true)));
  });

/** A port nobody uses now. */
export const freePort = () =>
  new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', reject);
    server.listen(0, '127.0.0.1', () => {
      const { port } = server.address();
      server.close(() => resolve(port));
    });
  });

/** @throws SetupProblem saying which port, who needs it, and how to choose another */
export async function requireFree(port, who, variable) {
  if (!Number.isInteger(port) || port < 1 || port > 65535)
    throw new SetupProblem(
      `${variable} is not a port: "${process.env[variable]}". Give a number, as in ${variable}=3001.`,
    );
  if (await isFree(port)) return;
  throw new SetupProblem(
    `Port ${port} is in use, and the ${who} needs it. Stop what uses it, or choose another: ${variable}=${port + 1} npm start`,
  );
}
