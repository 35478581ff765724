import { createServer } from "node:net";
import { codeOf, Trouble } from "./trouble.ts";

/** Listens there for a moment; resolves with the port, or rejects as the system said. */
const tryPort = (host: string, port: number): Promise<number> =>
  new Promise((resolve, reject) => {
    const server = createServer();
    server.once("error", reject);
    server.listen({ host, port, exclusive: true }, () => {
      const address = server.address();
      server.close(() => resolve(typeof address === "object" && address ? address.port : port));
    });
  });

/** A port that nothing listens on at this moment. */
export const freePort = (): Promise<number> => tryPort("127.0.0.1", 0);

export const isPortFree = (host: string, port: number): Promise<boolean> =>
  tryPort(host, port).then(
    () => true,
    () => false,
  );

/** Refuses in one sentence when the product could not listen there. */
export const requirePort = async (host: string, port: number, setting: string): Promise<void> => {
  try {
    await tryPort(host, port);
  } catch (error) {
    throw new Trouble(whyNot(host, port, setting, codeOf(error)), error);
  }
};

const whyNot = (host: string, port: number, setting: string, code: string): string => {
  if (code === "EADDRINUSE")
    return `Port ${port} on ${host} is in use by another program; stop that, or choose another port, for example ${setting}=${port + 1} npm start.`;
  if (code === "EACCES")
    return `Port ${port} may only be opened by root; choose one above 1023, for example ${setting}=4400 npm start.`;
  if (code === "EADDRNOTAVAIL" || code === "ENOTFOUND" || code === "EAI_AGAIN")
    return `${host} is not an address of this machine; set SHORTLIGHT_HOST to one that is, for example 127.0.0.1.`;
  return `Port ${port} on ${host} cannot be opened (${code || "unknown reason"}); choose another with ${setting}.`;
};
