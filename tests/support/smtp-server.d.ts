declare module 'smtp-server' {
  import type { Server } from 'node:net';
  import type { Readable } from 'node:stream';

  interface Session {
    envelope: { rcptTo: { address: string }[] };
  }

  /** The part of the package's face that the tests use. */
  export class SMTPServer {
    constructor(options: {
      disabledCommands?: string[];
      authOptional?: boolean;
      onData: (stream: Readable, session: Session, done: (error?: Error) => void) => void;
    });
    server: Server;
    on(event: 'error', listener: (error: Error) => void): void;
    listen(port: number, host: string, done: () => void): void;
    close(done: () => void): void;
  }
}
