import { simpleParser, type ParsedMail } from 'mailparser';
import type { AddressInfo, Socket } from 'node:net';
import { SMTPServer } from 'smtp-server';

/** A message as a mail server received it, parsed by a library that the product does not use. */
export interface ReceivedMail {
  recipients: string[];
  parsed: ParsedMail;
}

export interface FakeSmtp {
  readonly port: number;
  readonly received: ReceivedMail[];
  /** Recipients that are refused for good, with the words to the refusal. */
  readonly refused: Map<string, string>;
  /** While it holds, the server takes messages and breaks the connection instead of saying so. */
  diesBeforeReply: boolean;
  stop(): Promise<void>;
}

/** A mail server on loopback that keeps what it receives. */
export async function startFakeSmtp(port = 0): Promise<FakeSmtp> {
  const received: ReceivedMail[] = [];
  const refused = new Map<string, string>();
  const sockets = new Set<Socket>();
  const server = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    onRcptTo({ address }, _session, callback) {
      const words = refused.get(address);
      callback(words === undefined ? null : Object.assign(new Error(words), { responseCode: 550 }));
    },
    onData(stream, session, callback) {
      void simpleParser(stream).then((parsed) => {
        received.push({ recipients: session.envelope.rcptTo.map(({ address }) => address), parsed });
        if (!fake.diesBeforeReply) callback(null);
        else for (const socket of sockets) socket.destroy();
      });
    },
  });
  server.on('error', () => undefined);
  server.server.on('connection', (socket: Socket) => sockets.add(socket));
  await new Promise<void>((resolve) => server.listen(port, '127.0.0.1', resolve));
  const fake: FakeSmtp = {
    port: (server.server.address() as AddressInfo).port,
    received,
    refused,
    diesBeforeReply: false,
    stop() {
      for (const socket of sockets) socket.destroy();
      return new Promise((resolve) => server.close(() => resolve()));
    },
  };
  return fake;
}
