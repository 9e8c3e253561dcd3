import net from 'node:net';
import type { PutAddress } from './photo-routes';

/**
 * Announces all bytes at an address, sends only the first of them, and ends the connection, as a lost line does.
 * @returns what the store answered before the connection was closed
 */
export function putCut(address: PutAddress, bytes: Buffer, sent: number): Promise<string> {
  const url = new URL(address.url);
  return new Promise((resolve) => {
    let answered = '';
    const socket = net.connect(Number(url.port), url.hostname, () => {
      socket.write(
        [
          `PUT ${url.pathname}${url.search} HTTP/1.1`,
          `Host: ${url.host}`,
          ...Object.entries(address.headers).map(([name, value]) => `${name}: ${value}`),
          `Content-Length: ${bytes.length}`,
          '\r\n',
        ].join('\r\n'),
      );
      socket.end(bytes.subarray(0, sent));
    });
    socket.setEncoding('utf8');
    socket.on('data', (text: string) => (answered += text));
    // A line that is cut harshly is as good as one that ends: what counts is what the store keeps.
    socket.on('error', () => undefined);
    socket.on('close', () => resolve(answered));
  });
}
