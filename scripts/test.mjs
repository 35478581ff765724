import { handOverTo } from "./lib/bootstrap.mjs";

handOverTo("scripts/test.ts");
