import type { Campaign } from "#shared/api/instruments.ts";
import { useMakeCampaign, useSaveCampaign } from "#src/api/instruments.ts";
import { useForm } from "#src/lib/form.ts";
import { Button } from "#src/ui/button.tsx";
import { Dialog } from "#src/ui/dialog.tsx";
import { Form } from "#src/ui/form.tsx";
import { Select, TextInput } from "#src/ui/inputs.tsx";
import { announce } from "#src/ui/live-region.tsx";
import { CAMPAIGN_FIELDS, campaignSchema, draftOfCampaign } from "./campaign-draft.ts";

interface Props {
  programmeId: string;
  /** Null for a new one. */
  campaign: Campaign | null;
  onClose: () => void;
}

const FORM_ID = "campaign-form";

/** What the observing assumes; saving makes a new version and leaves the old one as it was. */
export const CampaignDialog = ({ programmeId, campaign, onClose }: Props) => {
  const make = useMakeCampaign(programmeId);
  const save = useSaveCampaign(programmeId);
  const form = useForm({
    schema: campaignSchema,
    initial: draftOfCampaign(campaign),
    send: async (body) => {
      if (campaign) await save.mutateAsync({ id: campaign.id, number: campaign.number, ...body });
      else await make.mutateAsync(body);
      announce(`Campaign ${body.name} is saved.`);
      onClose();
    },
  });
  const { values, fields } = form;
  return (
    <Dialog
      title={campaign ? `Campaign ${campaign.name}, version ${campaign.number}` : "New campaign"}
      isOpen
      onClose={onClose}
      footer={
        <>
          <Button onClick={onClose}>Not now</Button>
          <Button kind="main" type="submit" form={FORM_ID} isBusy={form.isBusy}>
            {campaign ? `Save version ${campaign.number + 1}` : "Make campaign"}
          </Button>
        </>
      }
    >
      <Form form={form} id={FORM_ID} aria-label="Campaign">
        <TextInput
          label="Name"
          name="name"
          autoComplete="off"
          value={values.name}
          error={fields.name}
          onChange={(event) => form.set({ name: event.target.value })}
        />
        {CAMPAIGN_FIELDS.map(({ key, label, unit, hint }) => (
          <TextInput
            key={key}
            label={label}
            name={key}
            isNumber
            autoComplete="off"
            unit={unit}
            hint={hint}
            value={values[key]}
            error={fields[key]}
            onChange={(event) => form.set({ [key]: event.target.value })}
          />
        ))}
        <Select
          label="Shape of the signal"
          name="statistic"
          hint="A trapezoid counts the sloping ends of a transit for less; a box takes the whole duration."
          value={values.statistic}
          onChange={(event) => form.set({ statistic: event.target.value })}
        >
          <option value="trapezoid">Trapezoid</option>
          <option value="boxcar">Box</option>
        </Select>
      </Form>
    </Dialog>
  );
};
