import { connect, createServer, type AddressInfo, type Socket } from 'node:net';

/** Passes TCP connections on to a server, and can lose them. */
export class Relay {
  private readonly pairs: { front: Socket; back: Socket }[] = [];
  private readonly lost = new Set<Socket>();
  private readonly server = createServer((front) => this.join(front));

  constructor(private readonly target: { host: string; port: number }) {}

  /** Begins to listen on a free port of this machine, which it returns. */
  async listen(): Promise<number> {
    await new Promise<void>((resolve) => this.server.listen(0, '127.0.0.1', resolve));
    return (this.server.address() as AddressInfo).port;
  }

  /** Ends the connections to the server but not those of the clients, as a router that forgets them does. */
  loseAll(): void {
    for (const { front, back } of this.pairs) {
      this.lost.add(front);
      back.destroy();
    }
  }

  close(): void {
    for (const { front } of this.pairs) front.destroy();
    this.server.close();
  }

  private join(front: Socket): void {
    const back = connect(this.target.port, this.target.host);
    this.pairs.push({ front, back });
    front.on('data', (bytes) => back.writable && back.write(bytes));
    back.on('data', (bytes) => front.write(bytes));
    front.on('close', () => back.destroy());
    back.on('close', () => {
      if (!this.lost.has(front)) front.destroy();
    });
    for (const socket of [front, back]) socket.on('error', () => socket.destroy());
  }
}
