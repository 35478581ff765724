import type { FormState } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Select, TextInput } from "#src/ui/inputs.tsx";
import { applies, type RecipeDraft, type ReleaseDraft } from "./recipe-draft.ts";
import { RecipeOrder } from "./recipe-order.tsx";
import {
  CHOICES,
  type ChoiceKey,
  FIGURES,
  type FigureKey,
  GROUPS,
  isChoice,
  isFigure,
  isOrder,
  ORDERS,
  type OrderKey,
  RELEASES,
  rangeWords,
  type SettingKey,
} from "./recipe-settings.ts";

interface Props {
  form: FormState<RecipeDraft>;
  /** What is wrong with a field, by its name. */
  wrong: Readonly<Record<string, string>>;
}

interface About {
  hint?: string;
  source?: string;
}

const sentence = (text: string): string => (text.endsWith(".") ? text : `${text}.`);
const sourceWords = ({ source }: About): string | undefined => source && sentence(source);
const hintWords = (about: About, range?: string): string =>
  [range && sentence(range), about.hint, sourceWords(about)].filter(Boolean).join(" ");

const FigureField = ({ settingKey, form, wrong }: Props & { settingKey: FigureKey }) => {
  const figure: (typeof FIGURES)[FigureKey] & About = FIGURES[settingKey];
  return (
    <div className="max-w-xl">
      <TextInput
        label={figure.label}
        name={settingKey}
        isInline
        isNumber
        autoComplete="off"
        unit={figure.unit}
        hint={hintWords(figure, rangeWords(settingKey))}
        value={form.values[settingKey]}
        error={wrong[settingKey]}
        onChange={(event) => form.set({ [settingKey]: event.target.value })}
      />
    </div>
  );
};

const ChoiceField = ({ settingKey, form, wrong }: Props & { settingKey: ChoiceKey }) => {
  const choice: (typeof CHOICES)[ChoiceKey] & About = CHOICES[settingKey];
  return (
    <div className="max-w-xl">
      <Select
        label={choice.label}
        name={settingKey}
        hint={hintWords(choice)}
        value={form.values[settingKey]}
        error={wrong[settingKey]}
        onChange={(event) => form.set({ [settingKey]: event.target.value })}
      >
        {choice.options.map(({ value, label }) => (
          <option key={value} value={value}>
            {label}
          </option>
        ))}
      </Select>
    </div>
  );
};

const OrderField = ({ settingKey, form, wrong }: Props & { settingKey: OrderKey }) => {
  const order: (typeof ORDERS)[OrderKey] & About = ORDERS[settingKey];
  return (
    <RecipeOrder
      label={order.label}
      name={settingKey}
      hint={order.hint}
      source={sourceWords(order)}
      error={wrong[settingKey]}
      options={order.options}
      chosen={form.values[settingKey]}
      onChange={(chosen) => form.set({ [settingKey]: chosen })}
    />
  );
};

/** Limits of single releases: a name and a number each. */
const ReleaseFields = ({ form, wrong }: Props) => {
  const { releases } = form.values;
  const change = (key: string, part: Partial<ReleaseDraft>) =>
    form.set({ releases: releases.map((each) => (each.key === key ? { ...each, ...part } : each)) });
  const add = () =>
    form.set({ releases: [...releases, { key: crypto.randomUUID(), release: "", limit: "1.4" }] });
  return (
    <fieldset name="releases" tabIndex={-1} className="max-w-xl">
      <legend className="font-medium">{RELEASES.label}</legend>
      <p className="text-xs text-soft">{RELEASES.hint}</p>
      {releases.map(({ key, release, limit }, i) => (
        <div key={key} className="mt-2 grid grid-cols-[minmax(0,1fr)_auto_auto] items-end gap-2">
          <TextInput
            label="Release"
            name={`releases.${i}.release`}
            autoComplete="off"
            value={release}
            error={wrong[`releases.${i}.release`]}
            onChange={(event) => change(key, { release: event.target.value })}
          />
          <TextInput
            label="RUWE limit"
            name={`releases.${i}.limit`}
            isNumber
            autoComplete="off"
            value={limit}
            error={wrong[`releases.${i}.limit`]}
            onChange={(event) => change(key, { limit: event.target.value })}
          />
          <Button
            aria-label={`Remove the limit of ${release || `release ${i + 1}`}`}
            onClick={() => form.set({ releases: releases.filter((each) => each.key !== key) })}
          >
            Remove
          </Button>
        </div>
      ))}
      {wrong.releases ? (
        <p className="mt-1 text-xs text-mark">
          <span aria-hidden="true">◆ </span>
          {wrong.releases}
        </p>
      ) : null}
      <div className="mt-2">
        <Button onClick={add}>Add a release</Button>
      </div>
    </fieldset>
  );
};

const SettingField = ({ settingKey, ...props }: Props & { settingKey: SettingKey }) => {
  if (!applies(props.form.values, settingKey)) return null;
  if (isFigure(settingKey)) return <FigureField settingKey={settingKey} {...props} />;
  if (isChoice(settingKey)) return <ChoiceField settingKey={settingKey} {...props} />;
  return isOrder(settingKey) ? (
    <OrderField settingKey={settingKey} {...props} />
  ) : (
    <ReleaseFields {...props} />
  );
};

/** Every setting in the order in which a star is derived; what does not apply is left out. */
export const RecipeFields = (props: Props) =>
  GROUPS.map(({ title, note, keys }) => (
    <section
      key={title}
      aria-label={title}
      className="grid gap-x-8 gap-y-3 border-t border-rule py-5 md:grid-cols-[14rem_minmax(0,1fr)]"
    >
      <div>
        <h2 className="text-[22px]">{title}</h2>
        {note ? <p className="mt-1 text-[13px] text-soft">{note}</p> : null}
      </div>
      <div className="flex min-w-0 flex-col gap-4">
        {keys.map((key) => (
          <SettingField key={key} settingKey={key} {...props} />
        ))}
      </div>
    </section>
  ));
