import tailwindcss from "@tailwindcss/vite";
import react from "@vitejs/plugin-react";
import { defineConfig } from "vite";

/** Where the development server finds the API: the web process started beside it. */
const api = process.env.SHORTLIGHT_API ?? "http://127.0.0.1:4400";

export default defineConfig({
  plugins: [react(), tailwindcss()],
  publicDir: "src/public",
  build: { outDir: "dist", emptyOutDir: true, assetsInlineLimit: 0, sourcemap: false },
  server: { host: "127.0.0.1", port: 4500, strictPort: true, proxy: { "/api": { target: api } } },
});
