import type { Extract, ExtractPreview, Finding } from "#shared/api/extracts.ts";

export const column = (index: number, header: string, means: string, unit = "") => ({
  index,
  header,
  means,
  unit,
  blankMarks: [],
  samples: [{ text: "14,495", value: 14.495 }],
  because: "name",
  asks: false,
});

export const finding = (code: string, more: Partial<Finding> = {}): Finding => ({
  level: "ask",
  code,
  column: null,
  message: `Question about ${code}.`,
  hint: "Answer it.",
  count: 1,
  examples: [],
  answers: [],
  ...more,
});

export const preview: ExtractPreview = {
  delimiter: ";",
  encoding: "utf-8",
  decimalMark: ",",
  columns: [column(0, "RA", "ra", "deg"), column(1, "e_Ks", "ks_mag_err", "mag"), column(2, "note", "kept")],
  findings: [],
  sampledRows: 1000,
  format: "delimited",
  variant: "semicolons",
  title: null,
  description: null,
  sources: [],
  declaredRows: null,
  rows: [],
  sky: [],
  knownPlan: null,
};

export const extract: Extract = {
  id: "5",
  number: 3,
  name: "Southern cool dwarfs",
  origin: "",
  state: "planning",
  isInvented: true,
  fileName: "south.csv",
  bytes: 61_200_000,
  receivedBytes: 61_200_000,
  sha256: `9c41${"0".repeat(56)}e07b`,
  companion: null,
  uploadedBy: { id: "1", name: "Ada Marlow" },
  createdAt: "2027-03-04T09:15:00.000Z",
  committedAt: null,
  edition: null,
  rows: null,
  newStars: null,
  plan: null,
  job: null,
  failure: null,
  version: 1,
};
