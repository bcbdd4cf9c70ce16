import { coreTrouble, errors, focusField } from '../model/view';

interface Props {
  /** Members of the quote's request that this question does not have. */
  readonly apart?: readonly string[];
}

/** What is wrong with the inquiry or the market, where it is not this question's own, with the way to it. */
export function Elsewhere({ apart = [] }: Props) {
  const trouble = coreTrouble.value;
  const wrong = [...errors.value.values()].find((fault) => !apart.includes(fault.at));
  return (
    <>
      {trouble !== null && <p class="notice wrong">{trouble}</p>}
      {wrong !== undefined && (
        <p class="notice wrong">
          {wrong.message}{' '}
          <button type="button" class="quiet" onClick={() => focusField(wrong.at)}>
            Go to it
          </button>
        </p>
      )}
    </>
  );
}
