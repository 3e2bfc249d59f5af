import { useSyncExternalStore, type ReactNode } from 'react';

const never = () => () => undefined;

/** Whether the script has taken the page over. */
const useTakenOver = (): boolean =>
  useSyncExternalStore(
    never,
    () => true,
    () => false,
  );

/**
 * The form around an island's fields. Until the script has taken it over its fields wait: what is typed before would be
 * lost.
 */
export function PostForm(props: { readonly onSubmit: () => Promise<void>; readonly children: ReactNode }) {
  const { onSubmit, children } = props;
  const isReady = useTakenOver();
  return (
    <form
      method="post"
      noValidate
      onSubmit={(event) => {
        event.preventDefault();
        void onSubmit();
      }}
    >
      <fieldset disabled={!isReady} className="min-w-0">
        {children}
      </fieldset>
    </form>
  );
}
