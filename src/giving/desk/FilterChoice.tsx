// One choice within the filter's sentence, with the stop that follows it.
type Props = {
  name: string;
  label: string;
  value: string;
  options: readonly (readonly [string, string])[];
  stop?: string;
};

export function FilterChoice({ name, label, value, options, stop }: Props) {
  return (
    <label>
      <span className="vh">{label}</span>
      <select name={name} defaultValue={value}>
        {options.map(([option, words]) => (
          <option key={option} value={option}>
            {words}
          </option>
        ))}
      </select>
      <span aria-hidden="true">{stop}</span>
    </label>
  );
}
