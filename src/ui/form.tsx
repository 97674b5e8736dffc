import { type FormEvent, type ReactNode, useEffect, useRef } from 'react';
import {
  type FieldValues,
  FormProvider,
  get,
  type SubmitHandler,
  type UseFormReturn,
  useFormState,
} from 'react-hook-form';
import { classNames } from './class-names.ts';
import { FieldFaults } from './field-faults.ts';
import { countFieldFaults, formFaults } from './form-faults.ts';
import { FormProblems } from './form-problems.tsx';

type FormProps<Values extends FieldValues, Context, Parsed> = {
  form: UseFormReturn<Values, Context, Parsed>;
  /** Await the request inside it, so that faults the server finds are shown and focused like any other. */
  onSubmit: SubmitHandler<Parsed>;
  /** The buttons. What went wrong is said directly above them. */
  actions: ReactNode;
  'aria-label'?: string;
  className?: string;
  children?: ReactNode;
};

export function Form<Values extends FieldValues, Context, Parsed>({
  form,
  onSubmit,
  actions,
  'aria-label': ariaLabel,
  className,
  children,
}: FormProps<Values, Context, Parsed>) {
  const element = useRef<HTMLFormElement>(null);
  const handledSubmits = useRef(0);
  const { errors, submitCount, isSubmitting } = useFormState({ control: form.control });
  const submit = form.handleSubmit(onSubmit);

  useEffect(() => {
    if (isSubmitting || submitCount === handledSubmits.current) return;
    handledSubmits.current = submitCount;
    element.current?.querySelector<HTMLElement>('[aria-invalid="true"]')?.focus();
  });

  return (
    <FormProvider {...form}>
      <FieldFaults value={(name) => messageOf(get(errors, name))}>
        <form
          ref={element}
          noValidate
          aria-label={ariaLabel}
          onSubmit={(event) => send(event, submit)}
          className={classNames('flex flex-col gap-6', className)}
        >
          {children}
          <div className="flex flex-col gap-4">
            <FormProblems problems={formFaults(errors)} faultyFields={submitCount > 0 ? countFieldFaults(errors) : 0} />
            {actions}
          </div>
        </form>
      </FieldFaults>
    </FormProvider>
  );
}

/** Events of a form in a dialog bubble to the form that opened it, which must not send itself. */
function send(event: FormEvent<HTMLFormElement>, submit: (event: FormEvent<HTMLFormElement>) => Promise<unknown>) {
  event.stopPropagation();
  void submit(event);
}

function messageOf(fault: unknown): string | undefined {
  if (typeof fault !== 'object' || fault === null || !('message' in fault)) return undefined;
  return typeof fault.message === 'string' && fault.message !== '' ? fault.message : undefined;
}
