import { useParams } from "react-router-dom";

/** Id of the programme in the address; every screen inside a programme has one. */
export const useProgrammeId = (): string => {
  const { programmeId } = useParams();
  if (!programmeId) throw new Error("This screen stands outside a programme.");
  return programmeId;
};
