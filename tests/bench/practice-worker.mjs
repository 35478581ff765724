import { register } from "tsx/esm/api";

register();
await import("./practice-worker.ts");
