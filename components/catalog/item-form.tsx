"use client";

import { zodResolver } from "@hookform/resolvers/zod";
import { useRouter } from "next/navigation";
import { useForm } from "react-hook-form";
import { z } from "zod";
import { Button } from "@/components/ui/button";
import { FieldGroup, TextArea, TextField } from "@/components/ui/field";
import { Notice } from "@/components/ui/notice";
import { CATALOG_DATA, CATALOG_KIND_WORDS, type CatalogKind } from "@/lib/domain/catalog";
import { createItemSchema, kindSlug, type ItemView } from "@/lib/schemas/catalog";
import { typedSchema, typedValues, type FieldData } from "@/lib/schemas/form-fields";
import { SaveTrouble } from "./save-trouble";
import { SchemaForm } from "./schema-form";
import { showFieldErrors, useSave } from "./use-save";
import { registered } from "./registered";

export interface ItemFormProps {
  readonly kind: CatalogKind;
  /** Null: a new item. */
  readonly item: Pick<ItemView, "id" | "code" | "name" | "version" | "data" | "evidence"> | null;
}

function formSchema(kind: CatalogKind) {
  const { code, name, evidence } = createItemSchema.shape;
  return z.object({ code, name, evidence, data: typedSchema(CATALOG_DATA[kind]) });
}

function useItemForm({ kind, item }: ItemFormProps) {
  return useForm({
    resolver: zodResolver(formSchema(kind)),
    // Follows what stands: a version saved here or loaded anew takes the place of what was typed.
    values: {
      code: item?.code ?? "",
      name: item?.name ?? "",
      evidence: item?.evidence ?? "",
      data: typedValues(CATALOG_DATA[kind], item?.data as FieldData | undefined),
    },
  });
}

/** An item of the catalog, new or as its next version. */
export function ItemForm({ kind, item }: ItemFormProps) {
  const router = useRouter();
  const form = useItemForm({ kind, item });
  const path = `/catalog/${kindSlug(kind)}`;
  const save = useSave<ItemView>({
    onSaved: (saved) => (item ? router.refresh() : router.push(`${path}/${saved.id}`)),
  });
  const submit = form.handleSubmit(({ code, ...typed }) =>
    save.mutate(
      item
        ? { method: "PUT", path: `${path}/${item.id}`, body: typed, ifMatch: item.version }
        : { method: "POST", path, body: { code, ...typed } },
      { onError: (error) => showFieldErrors(error, form.setError) },
    ),
  );
  const { errors } = form.formState;
  return (
    <form onSubmit={(event) => void submit(event)} noValidate>
      <FieldGroup legend="What it is">
        {item === null && (
          <TextField
            label="Code"
            error={errors.code?.message}
            help="Short, as on drawings and labels; it stays."
            maxLength={40}
            {...registered(form, "code")}
          />
        )}
        <TextField label="Name" error={errors.name?.message} maxLength={200} {...registered(form, "name")} />
        <TextArea
          label="Evidence"
          rows={2}
          help="Where these data come from: which sheet and issue, or who measured them, when."
          error={errors.evidence?.message}
          {...registered(form, "evidence")}
        />
      </FieldGroup>
      <SchemaForm subject={kind} schema={CATALOG_DATA[kind]} form={form} prefix="data" />
      <SaveTrouble error={save.error} onLoad={save.reset} />
      {save.isSuccess && item && (
        <Notice live="status">
          <p>
            Saved as version {save.data.version}. The machines that have this {CATALOG_KIND_WORDS[kind].one}{" "}
            are being checked again. To take it back, put the version before it back below.
          </p>
        </Notice>
      )}
      <div className="acts mt-4">
        <Button type="submit" variant="primary" busy={save.isPending}>
          {item
            ? `Save as version ${item.version + 1}`
            : `Put the ${CATALOG_KIND_WORDS[kind].one} into the catalog`}
        </Button>
      </div>
    </form>
  );
}
