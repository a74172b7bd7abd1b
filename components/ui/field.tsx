import { useId, type ComponentProps, type ReactNode } from "react";

interface FieldWords {
  readonly label: ReactNode;
  /** Set behind the input. */
  readonly unit?: string | undefined;
  readonly help?: ReactNode;
  /** What is wrong and how to put it right; marks the field as invalid. */
  readonly error?: string | undefined;
  /** Shown beside the label where a field may stay empty. */
  readonly optional?: boolean | undefined;
}

interface Wiring {
  readonly id: string;
  readonly "aria-describedby": string | undefined;
  readonly "aria-invalid": true | undefined;
}

function useWiring(given: string | undefined, { unit, help, error }: FieldWords): Wiring {
  const own = useId();
  const id = given ?? own;
  const described = [unit && `${id}-unit`, help !== undefined && `${id}-help`, error && `${id}-error`];
  return {
    id,
    "aria-describedby": described.filter(Boolean).join(" ") || undefined,
    "aria-invalid": error ? true : undefined,
  };
}

function Frame({ id, words, children }: { id: string; words: FieldWords; children: ReactNode }) {
  return (
    <div className={words.error ? "field field-wrong" : "field"}>
      <label htmlFor={id}>
        {words.label}
        {words.optional && <span className="field-optional"> may stay empty</span>}
      </label>
      <div className="field-entry">
        {children}
        {words.unit && (
          <span className="field-unit" id={`${id}-unit`}>
            {words.unit}
          </span>
        )}
      </div>
      <Notes id={id} words={words} />
    </div>
  );
}

function Notes({ id, words }: { id: string; words: FieldWords }) {
  return (
    <>
      {words.error && (
        <p className="field-error" id={`${id}-error`}>
          {words.error}
        </p>
      )}
      {words.help !== undefined && (
        <p className="field-help" id={`${id}-help`}>
          {words.help}
        </p>
      )}
    </>
  );
}

/** Splits a field's words from the properties of its control. */
function split<P extends FieldWords>({ label, unit, help, error, optional, ...control }: P) {
  return { words: { label, unit, help, error, optional }, control };
}

export type TextFieldProps = FieldWords & ComponentProps<"input">;

export function TextField(props: TextFieldProps) {
  const { words, control } = split(props);
  const wiring = useWiring(props.id, words);
  const numeric =
    control.type === "number" || control.inputMode === "decimal" || control.inputMode === "numeric";
  return (
    <Frame id={wiring.id} words={words}>
      <input {...control} {...wiring} className={numeric ? "entry entry-number" : "entry"} />
    </Frame>
  );
}

export type TextAreaProps = FieldWords & ComponentProps<"textarea"> & { readonly code?: boolean | undefined };

/** `code` sets the text in the configuration face, unwrapped. */
export function TextArea({ code = false, ...props }: TextAreaProps) {
  const { words, control } = split(props);
  const wiring = useWiring(props.id, words);
  return (
    <Frame id={wiring.id} words={words}>
      <textarea
        rows={4}
        {...(code ? { spellCheck: false, autoCapitalize: "off", autoComplete: "off", wrap: "off" } : {})}
        {...control}
        {...wiring}
        className={code ? "entry entry-code" : "entry"}
      />
    </Frame>
  );
}

export type SelectFieldProps = FieldWords & ComponentProps<"select">;

export function SelectField(props: SelectFieldProps) {
  const { words, control } = split(props);
  const wiring = useWiring(props.id, words);
  return (
    <Frame id={wiring.id} words={words}>
      <select {...control} {...wiring} className="entry" />
    </Frame>
  );
}

export type CheckboxFieldProps = Omit<FieldWords, "unit"> & Omit<ComponentProps<"input">, "type">;

export function CheckboxField(props: CheckboxFieldProps) {
  const { words, control } = split(props);
  const wiring = useWiring(props.id, words);
  return (
    <div className={words.error ? "field field-wrong" : "field"}>
      <div className="field-check">
        <input {...control} {...wiring} type="checkbox" />
        <label htmlFor={wiring.id}>{words.label}</label>
      </div>
      <Notes id={wiring.id} words={words} />
    </div>
  );
}

export interface FieldGroupProps {
  readonly legend: ReactNode;
  readonly help?: ReactNode;
  readonly children: ReactNode;
}

/** Fields that belong together, in as many columns as fit. */
export function FieldGroup({ legend, help, children }: FieldGroupProps) {
  return (
    <fieldset className="field-group">
      <legend>{legend}</legend>
      {help !== undefined && <p className="field-help">{help}</p>}
      <div className="field-columns">{children}</div>
    </fieldset>
  );
}

export interface RadioOption {
  readonly value: string;
  readonly label: ReactNode;
  readonly help?: ReactNode;
}

export type RadioFieldProps = Omit<FieldWords, "unit" | "optional"> &
  Omit<ComponentProps<"input">, "type" | "value"> & { readonly options: readonly RadioOption[] };

/** One of a few choices, all in sight. */
export function RadioField({ options, ...props }: RadioFieldProps) {
  const { words, control } = split(props);
  const { id, ...wiring } = useWiring(props.id, words);
  return (
    <fieldset
      className={words.error ? "field field-wrong" : "field"}
      aria-describedby={wiring["aria-describedby"]}
    >
      <legend className="field-legend">{words.label}</legend>
      {options.map((option, index) => (
        <div className="field-check" key={option.value}>
          <input {...control} type="radio" id={`${id}-${index}`} value={option.value} />
          <label htmlFor={`${id}-${index}`}>
            {option.label}
            {option.help !== undefined && <span className="field-help"> {option.help}</span>}
          </label>
        </div>
      ))}
      <Notes id={id} words={words} />
    </fieldset>
  );
}
