import { useSuspenseQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { Controller, useForm } from 'react-hook-form';
import type { ShopSettings } from '../../../shared/administration';
import { Button } from '../../components/ui/button';
import { Field } from '../../components/ui/field';
import { HowComputed } from '../../components/ui/how-computed';
import { Segmented } from '../../components/ui/segmented';
import { Sheet } from '../../components/ui/sheet';
import { TextInput } from '../../components/ui/text-input';
import { lazyResolver, placeServerErrors } from '../../lib/form';
import { useChange } from '../../lib/use-change';
import { MoneyInput } from './money-input';
import { saveShop, shopQuery } from './queries';

type Values = Omit<ShopSettings, 'id'>;

const NAMES = [
  'name',
  'windowDays',
  'windowHours',
  'doorRateCents',
  'timeZone',
  'locale',
  'currency',
  'lengthUnit',
  'temperatureUnit',
] as const satisfies readonly (keyof Values)[];

const resolver = lazyResolver<Values>(() =>
  import('../../../shared/administration').then((schemas) => schemas.changeShopSettings.required()),
);

export function ShopForm() {
  const { id: _id, ...saved } = useSuspenseQuery(shopQuery).data;
  const form = useForm<Values>({ resolver, values: saved });
  const [failure, setFailure] = useState<string | null>(null);
  // The window decides what came back: every figure in the client is read anew.
  const save = useChange(saveShop, { said: 'The settings are saved.', isForm: true });
  const { errors, dirtyFields, isDirty } = form.formState;

  const submit = form.handleSubmit(async (values) => {
    setFailure(null);
    const changed = NAMES.filter((name) => dirtyFields[name]).map((name) => [name, values[name]]);
    try {
      await save.mutateAsync(Object.fromEntries(changed));
    } catch (error) {
      setFailure(placeServerErrors<Values>(error, NAMES, form.setError));
    }
  });

  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-6">
      <Sheet title="What counts" actions={<HowComputed anchor="comeback-rate" />}>
        <div className="grid gap-4 desk:grid-cols-3">
          <Field
            label="Days within which a return counts"
            hint="From the day the first work was done."
            error={errors.windowDays?.message}
          >
            {(control) => (
              <TextInput
                {...control}
                inputMode="numeric"
                {...form.register('windowDays', { setValueAs: toNumber })}
              />
            )}
          </Field>
          <Field
            label="And within hours on the meter"
            hint="Empty: days alone decide. Counts where both readings exist."
            error={errors.windowHours?.message}
          >
            {(control) => (
              <TextInput
                {...control}
                inputMode="decimal"
                {...form.register('windowHours', { setValueAs: toNumberOrNull })}
              />
            )}
          </Field>
          <Field
            label="Door rate, an hour"
            hint="What labor given away is counted at."
            error={errors.doorRateCents?.message}
          >
            {(control) => (
              <Controller
                control={form.control}
                name="doorRateCents"
                render={({ field }) => (
                  <MoneyInput
                    {...control}
                    name={field.name}
                    valueCents={field.value}
                    onChange={field.onChange}
                  />
                )}
              />
            )}
          </Field>
        </div>
      </Sheet>
      <Sheet title="The shop" sub="How dates, figures and measures are written.">
        <div className="grid gap-4 desk:grid-cols-3">
          <Field label="Name" error={errors.name?.message}>
            {(control) => <TextInput {...control} {...form.register('name')} />}
          </Field>
          <Field label="Time zone" hint="Such as America/Chicago." error={errors.timeZone?.message}>
            {(control) => <TextInput {...control} list="time-zones" {...form.register('timeZone')} />}
          </Field>
          <datalist id="time-zones">
            {Intl.supportedValuesOf('timeZone').map((zone) => (
              <option key={zone} value={zone} />
            ))}
          </datalist>
          <Field label="Language and country" hint="Such as en-US or en-CA." error={errors.locale?.message}>
            {(control) => <TextInput {...control} {...form.register('locale')} />}
          </Field>
          <Field label="Currency" hint="Three letters, such as USD." error={errors.currency?.message}>
            {(control) => <TextInput {...control} {...form.register('currency')} />}
          </Field>
          <div className="flex flex-col gap-1">
            <p className="text-table font-label">Lengths</p>
            <Controller
              control={form.control}
              name="lengthUnit"
              render={({ field }) => (
                <Segmented
                  label="Lengths"
                  value={field.value}
                  onChange={field.onChange}
                  options={[
                    { value: 'in', label: 'inches' },
                    { value: 'mm', label: 'millimeters' },
                  ]}
                />
              )}
            />
          </div>
          <div className="flex flex-col gap-1">
            <p className="text-table font-label">Temperatures</p>
            <Controller
              control={form.control}
              name="temperatureUnit"
              render={({ field }) => (
                <Segmented
                  label="Temperatures"
                  value={field.value}
                  onChange={field.onChange}
                  options={[
                    { value: 'degF', label: '°F' },
                    { value: 'Cel', label: '°C' },
                  ]}
                />
              )}
            />
          </div>
        </div>
      </Sheet>
      {failure && (
        <p role="alert" className="border-l-3 border-oxide pl-3 text-oxide">
          {failure}
        </p>
      )}
      <div className="flex gap-3">
        <Button type="submit" look="primary" disabled={!isDirty} isBusy={save.isPending}>
          Save
        </Button>
        {isDirty && <Button onClick={() => form.reset()}>Take back</Button>}
      </div>
    </form>
  );
}

const toNumber = (value: unknown) => (value === '' ? Number.NaN : Number(value));
const toNumberOrNull = (value: unknown) => (value === '' || value === null ? null : Number(value));
