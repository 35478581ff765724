import type { FormState } from "#src/lib/form.ts";
import { Select, TextArea, TextInput } from "#src/ui/inputs.tsx";
import { SectionTitle } from "#src/ui/section-title.tsx";
import { type CardDraft, withModel } from "./card-draft.ts";
import {
  type ChoiceField,
  GROUPS,
  isChoice,
  MODEL_LABELS,
  type Model,
  type NumberField,
  PASSBAND_CHOICES,
  PHOTON_BAND_CHOICES,
} from "./card-fields.ts";

interface Props {
  form: FormState<CardDraft>;
  /** Whoever may not edit reads the same figures. */
  isReadOnly: boolean;
}

const Figure = ({ field, form, isReadOnly }: Props & { field: NumberField }) => (
  <TextInput
    label={field.label}
    name={`figures.${field.key}`}
    isInline
    isNumber
    autoComplete="off"
    unit={field.unit}
    hint={field.hint}
    readOnly={isReadOnly}
    value={form.values.figures[field.key] ?? ""}
    error={form.fields[`figures.${field.key}`]}
    onChange={(event) => {
      const { value } = event.target;
      form.set((now) => ({ figures: { ...now.figures, [field.key]: value } }));
    }}
  />
);

const Choice = ({ field, form, isReadOnly }: Props & { field: ChoiceField }) => (
  <Select
    label={field.label}
    name={`figures.${field.key}`}
    isInline
    hint={field.hint}
    disabled={isReadOnly}
    value={form.values.figures[field.key] ?? ""}
    error={form.fields[`figures.${field.key}`]}
    onChange={(event) => {
      const { value } = event.target;
      form.set((now) => ({ figures: { ...now.figures, [field.key]: value } }));
    }}
  >
    {field.choices.map(({ value, label }) => (
      <option key={value} value={value}>
        {label}
      </option>
    ))}
  </Select>
);

/** Passband: where the star's magnitude comes from, and for a telescope the band its photons are counted in. */
const Passband = ({ form, isReadOnly }: Props) => (
  <>
    <Select
      label="Magnitude from"
      name="passband"
      hint="The column that holds a star's magnitude in the instrument's passband."
      disabled={isReadOnly}
      value={form.values.passband}
      onChange={(event) => form.set({ passband: event.target.value })}
    >
      {PASSBAND_CHOICES.map(({ value, label }) => (
        <option key={value} value={value}>
          {label}
        </option>
      ))}
    </Select>
    {form.values.model === "detector" ? (
      <Select
        label="Photons in"
        name="photonBand"
        hint="The band whose photons the detector counts."
        disabled={isReadOnly}
        value={form.values.photonBand}
        onChange={(event) => form.set({ photonBand: event.target.value })}
      >
        {PHOTON_BAND_CHOICES.map(({ value, label }) => (
          <option key={value} value={value}>
            {label}
          </option>
        ))}
      </Select>
    ) : null}
  </>
);

/** The figures of a card, in the groups of its model. */
export const CardFields = ({ form, isReadOnly }: Props) => (
  <>
    <TextInput
      label="Name"
      name="name"
      autoComplete="off"
      readOnly={isReadOnly}
      value={form.values.name}
      error={form.fields.name}
      onChange={(event) => form.set({ name: event.target.value })}
    />
    <TextArea
      label="Source"
      name="source"
      rows={2}
      hint="Where the figures come from. Without it every number made with the card is marked unverified."
      readOnly={isReadOnly}
      value={form.values.source}
      error={form.fields.source}
      onChange={(event) => form.set({ source: event.target.value })}
    />
    <Select
      label="Noise from"
      name="model"
      disabled={isReadOnly}
      value={form.values.model}
      onChange={(event) => {
        const model = event.target.value as Model;
        form.set((now) => withModel(now, model));
      }}
    >
      {Object.entries(MODEL_LABELS).map(([value, label]) => (
        <option key={value} value={value}>
          {label}
        </option>
      ))}
    </Select>
    <Passband form={form} isReadOnly={isReadOnly} />
    {GROUPS[form.values.model].map(({ title, fields }) => (
      <div key={title} className="-mt-3">
        <SectionTitle>{title}</SectionTitle>
        <div className="flex flex-col gap-2">
          {fields.map((field) =>
            isChoice(field) ? (
              <Choice key={field.key} field={field} form={form} isReadOnly={isReadOnly} />
            ) : (
              <Figure key={field.key} field={field} form={form} isReadOnly={isReadOnly} />
            ),
          )}
        </div>
      </div>
    ))}
  </>
);
