import { useState } from "react";
import { LIMITS } from "#shared/limits.ts";
import { refusalOf } from "./file-drop.tsx";
import { pastedFile, pastedRefusal } from "./pasted.ts";

export type Way = "file" | "paste";

/** A name to begin with: the file's own without its ending. */
const nameOf = (file: File): string =>
  file.name
    .replace(/\.gz$/i, "")
    .replace(/\.[a-z0-9]{1,5}$/i, "")
    .replaceAll("_", " ")
    .slice(0, LIMITS.nameCharacters);

const companionRefusal = (file: File | null): string | undefined =>
  file && file.size > LIMITS.companionBytes
    ? `A description may have at most ${LIMITS.companionBytes / 1024 ** 2} MiB. Choose the text that describes the columns.`
    : undefined;

/** What a person has put together so far to bring as an extract. */
export const useReadDraft = () => {
  const [way, setWay] = useState<Way>("file");
  const [file, setFile] = useState<File | null>(null);
  const [companion, setCompanion] = useState<File | null>(null);
  const [pasted, setPasted] = useState("");
  const [name, setName] = useState("");
  const [origin, setOrigin] = useState("");
  const [isTried, setTried] = useState(false);
  const choose = (chosen: File): void => {
    setFile(chosen);
    if (name.trim() === "" || (file && name === nameOf(file))) setName(nameOf(chosen));
  };
  const isTooLarge = file !== null && file.size > LIMITS.fileBytes;
  const refusal = way === "file" ? refusalOf(file) : pastedRefusal(pasted);
  const companionError = companionRefusal(companion);
  const isReady = refusal === undefined && companionError === undefined && name.trim() !== "";
  return {
    way,
    setWay,
    file,
    choose,
    companion,
    setCompanion,
    companionError,
    pasted,
    setPasted,
    name,
    setName,
    origin,
    setOrigin,
    fileError: isTried || isTooLarge ? refusal : undefined,
    nameError: isTried && name.trim() === "" ? "Give the extract a name." : undefined,
    /** The file to send, once nothing is missing; says what is missing otherwise. */
    ready: (): File | null => {
      setTried(true);
      if (!isReady) return null;
      return way === "file" ? file : pastedFile(pasted);
    },
  };
};

export type ReadDraft = ReturnType<typeof useReadDraft>;
