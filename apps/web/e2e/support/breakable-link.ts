import { connect, createServer, type AddressInfo, type Socket } from 'node:net';

/** A way to a server that can be cut and mended, as a network is. */
export interface BreakableLink {
  url: string;
  /** Ends what is under way and lets nothing through. */
  cut: () => void;
  mend: () => void;
  close: () => void;
}

export async function linkTo(target: string): Promise<BreakableLink> {
  const { hostname, port } = new URL(target);
  const sockets = new Set<Socket>();
  let isCut = false;
  const link = createServer((near) => {
    if (isCut) return near.destroy();
    const far = connect(Number(port), hostname);
    for (const [socket, other] of [
      [near, far],
      [far, near],
    ] as const) {
      sockets.add(socket);
      // A side that is cut off ends the other; the reason is of no interest here.
      socket.on('error', () => other.destroy());
      socket.on('close', () => {
        sockets.delete(socket);
        other.destroy();
      });
      socket.pipe(other);
    }
  });
  await new Promise<void>((resolve) => link.listen(0, '127.0.0.1', resolve));
  const end = () => {
    for (const socket of sockets) socket.destroy();
  };
  return {
    url: `http://127.0.0.1:${(link.address() as AddressInfo).port}`,
    cut: () => {
      isCut = true;
      end();
    },
    mend: () => {
      isCut = false;
    },
    close: () => {
      end();
      link.close();
    },
  };
}
