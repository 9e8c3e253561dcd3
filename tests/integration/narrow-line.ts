import net from 'node:net';

/** A line to a server that lets only so many connections through, until it is widened. */
export async function narrowLine(port: number, most: number) {
  let left = most;
  const server = net.createServer((from) => {
    left -= 1;
    if (left < 0) {
      from.destroy();
      return;
    }
    const to = net.connect(port, '127.0.0.1');
    for (const end of [from, to]) end.on('error', () => undefined);
    from.pipe(to).pipe(from);
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  return {
    port: (server.address() as net.AddressInfo).port,
    widen: () => (left = Infinity),
    stop: () => server.close(),
  };
}
