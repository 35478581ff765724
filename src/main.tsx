import "./index.css";
import { QueryClientProvider } from "@tanstack/react-query";
import { StrictMode } from "react";
import { createRoot } from "react-dom/client";
import { RouterProvider } from "react-router-dom";
import { createQueryClient } from "./app/query-client.ts";
import { createRouter } from "./app/router.tsx";
import { leadToSignIn } from "./app/signed-out.ts";
import { LiveRegion } from "./ui/live-region.tsx";

const root = document.getElementById("root");
if (!root) throw new Error("The page has no place for the application.");
const queryClient = createQueryClient();
leadToSignIn();

createRoot(root).render(
  <StrictMode>
    <QueryClientProvider client={queryClient}>
      <RouterProvider router={createRouter(queryClient)} />
      <LiveRegion />
    </QueryClientProvider>
  </StrictMode>,
);
