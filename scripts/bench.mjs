import { handOverTo } from "./lib/bootstrap.mjs";

handOverTo("scripts/bench.ts");
