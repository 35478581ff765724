import { handOverTo } from "./lib/bootstrap.mjs";

handOverTo("scripts/start.ts");
