import { Select } from '../../components/ui/select';

type Props = {
  models: readonly { id: string; name: string }[];
  families: readonly { id: string; name: string }[];
  modelId: string | undefined;
  familyId: string | undefined;
  onChange: (scope: { model?: string; family?: string }) => void;
};

/** All models, a family, or one model. */
export function ScopePicker({ models, families, modelId, familyId, onChange }: Props) {
  const value = modelId ? `model ${modelId}` : familyId ? `family ${familyId}` : '';
  return (
    <Select
      look="picker"
      label="Model or family"
      value={value}
      onChange={(chosen) => {
        const [kind, id] = chosen.split(' ');
        onChange(kind === 'model' && id ? { model: id } : kind === 'family' && id ? { family: id } : {});
      }}
      options={[
        { value: '', label: 'all models' },
        ...families.map(({ id, name }) => ({ value: `family ${id}`, label: `family ${name}` })),
        ...models.map(({ id, name }) => ({ value: `model ${id}`, label: name })),
      ]}
    />
  );
}
