import { connect, createServer, type Server, type Socket } from "node:net";

/** A line to the database that can be cut and mended. */
export class DatabaseLine {
  private server: Server | undefined;
  private readonly sockets = new Set<Socket>();

  constructor(
    private readonly to: { host: string; port: number },
    public port = 0,
  ) {}

  async mend(): Promise<void> {
    this.server = createServer((near) => {
      const far = connect(this.to.port, this.to.host);
      for (const socket of [near, far]) {
        this.sockets.add(socket);
        socket.on("error", () => socket.destroy());
      }
      near.pipe(far).pipe(near);
    });
    await new Promise<void>((resolve) => this.server?.listen(this.port, "127.0.0.1", resolve));
    const address = this.server.address();
    if (typeof address === "object" && address) this.port = address.port;
  }

  async cut(): Promise<void> {
    for (const socket of this.sockets) socket.destroy();
    this.sockets.clear();
    await new Promise<void>((resolve) => this.server?.close(() => resolve()));
  }
}
