import { handOverTo } from "./lib/bootstrap.mjs";

handOverTo("tests/bench/run.ts");
