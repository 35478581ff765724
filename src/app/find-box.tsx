import { type FormEvent, useState } from "react";
import { useNavigate } from "react-router-dom";
import { paths } from "./paths.ts";

/** Finds a star by name or identifier; the answer opens in the catalogue, where it also says why a star is not shown. */
export const FindBox = ({ programmeId }: { programmeId: string }) => {
  const navigate = useNavigate();
  const [text, setText] = useState("");
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const asked = text.trim();
    if (asked === "") return;
    // Keep the view that is on screen: "why is it not in this result" only makes sense within it.
    const params = new URLSearchParams(
      window.location.pathname.endsWith("/catalogue") ? window.location.search : "",
    );
    params.set("find", asked);
    navigate(paths.programme.to(programmeId, "catalogue", `?${params}`));
  };
  return (
    <search>
      <form onSubmit={submit} className="relative">
        <input
          id="find-box"
          type="search"
          aria-label="Find a star"
          aria-keyshortcuts="/"
          placeholder="Find a star"
          value={text}
          onChange={(event) => setText(event.target.value)}
          className="w-44 rounded border border-edge bg-sheet py-1.5 pr-8 pl-2.5 text-ink 2xl:w-60"
        />
        <kbd className="pointer-events-none absolute top-1.5 right-2.5 font-mono text-soft">/</kbd>
      </form>
    </search>
  );
};
