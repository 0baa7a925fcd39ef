import type { ModelPreview } from '#contract/api.ts';
import { type Draft, override, overrideOf } from './draft.ts';
import { Formula, Panel } from './parts.tsx';

interface Props {
  readonly preview: ModelPreview;
  readonly draft: Draft;
  readonly edit: (part: Partial<Draft>, tag?: string) => void;
}

const KINDS = ['real', 'complex'] as const;

export function FieldTable({ preview, draft, edit }: Props) {
  if (preview.fields.length === 0) return null;
  return (
    <Panel title="Fields">
      <div className="scroll-x">
        <table className="table table-plain">
          <thead>
            <tr>
              <th scope="col">Field</th>
              <th scope="col">Kind</th>
              <th scope="col">Mass squared</th>
              <th scope="col" className="n">
                Dimension
              </th>
            </tr>
          </thead>
          <tbody>
            {preview.fields.map((field) => (
              <tr key={field.name}>
                <th scope="row">
                  <Formula html={field.mathml} />
                </th>
                <td>
                  <select
                    name={`field:kind:${field.name}`}
                    className="select input-small"
                    aria-label={`Kind of ${field.name}`}
                    value={overrideOf(draft.fields, field.name)?.kind ?? ''}
                    onChange={({ target }) =>
                      edit({
                        fields: override(draft.fields, field.name, {
                          kind: KINDS.find((kind) => kind === target.value),
                        }),
                      })
                    }
                  >
                    <option value="">{field.kind} (as read)</option>
                    {KINDS.map((kind) => (
                      <option key={kind}>{kind}</option>
                    ))}
                  </select>
                </td>
                <td className="m">{field.mass === '' || field.mass === '0' ? 'massless' : field.mass}</td>
                <td className="n m">{field.dimension}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </Panel>
  );
}

const ROLES = { coupling: 'coupling', propagator: 'in a propagator', both: 'both' } as const;

export function ParameterTable({ preview, draft, edit }: Props) {
  if (preview.parameters.length === 0) return null;
  const set = (name: string, change: Parameters<typeof override<Draft['parameters'][number][1]>>[2]) =>
    edit({ parameters: override(draft.parameters, name, change) }, `parameter ${name} ${Object.keys(change)}`);
  return (
    <Panel title="Parameters">
      <div className="scroll-x">
        <table className="table table-plain parameters">
          <thead>
            <tr>
              <th scope="col">Parameter</th>
              <th scope="col">Stands as</th>
              <th scope="col">Dimension</th>
              <th scope="col">Weight</th>
              <th scope="col">Loop order</th>
              <th scope="col">As vertex</th>
            </tr>
          </thead>
          <tbody>
            {preview.parameters.map((parameter) => {
              const own = overrideOf(draft.parameters, parameter.name);
              return (
                <tr key={parameter.name}>
                  <th scope="row">
                    <Formula html={parameter.mathml} />
                  </th>
                  <td>{ROLES[parameter.role]}</td>
                  <td>
                    <span className="m">{parameter.dimension}</span>
                    {parameter.renormalisability !== '' && (
                      <span className="quiet">, {parameter.renormalisability}</span>
                    )}
                  </td>
                  <td>
                    <input
                      name={`parameter:weight:${parameter.name}`}
                      className="input input-small"
                      size={5}
                      aria-label={`Weight of ${parameter.name} in the order`}
                      placeholder={parameter.weight}
                      value={own?.weight === undefined ? '' : String(own.weight)}
                      onChange={({ target }) => set(parameter.name, { weight: target.value.trim() || undefined })}
                    />
                  </td>
                  <td>
                    <input
                      name={`parameter:loops:${parameter.name}`}
                      className="input input-small"
                      type="number"
                      min={0}
                      max={20}
                      aria-label={`Loop order of ${parameter.name}`}
                      placeholder={String(parameter.loops)}
                      value={own?.loops ?? ''}
                      onChange={({ target }) => set(parameter.name, { loops: target.valueAsNumber || undefined })}
                    />
                  </td>
                  <td>
                    <label className="tick">
                      <span className="sr-only">Quadratic terms with {parameter.name} are vertices</span>
                      <input
                        name={`parameter:vertex:${parameter.name}`}
                        type="checkbox"
                        checked={own?.vertex ?? false}
                        onChange={({ target }) => set(parameter.name, { vertex: target.checked || undefined })}
                      />
                    </label>
                  </td>
                </tr>
              );
            })}
          </tbody>
        </table>
      </div>
      <p className="hint">
        Weight: what one power counts in the order (0: a constant). Loop order: for counterterms. As vertex: quadratic
        terms with it are vertices with two lines.
      </p>
    </Panel>
  );
}
