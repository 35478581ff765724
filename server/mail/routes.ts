import { z } from "zod";
import { mail } from "#shared/api/session.ts";
import type { Routes } from "../http/route.ts";
import { presentMail } from "./present.ts";
import { readMailbox } from "./service.ts";

export const addMailRoutes = (routes: Routes): void => {
  routes.add(
    {
      method: "get",
      path: "/mailbox",
      access: "installation-administrator",
      answer: z.object({ mails: z.array(mail) }),
    },
    async ({ deps }) => ({
      mails: (await readMailbox(deps)).map(presentMail),
    }),
  );
};
