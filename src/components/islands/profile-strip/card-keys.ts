import type { KeyboardEvent } from 'react';

/** What a key on a card asks for; moving the focus is done here, changes are left to the editor. */
export type CardKey = { readonly ask: 'add' | 'remove'; readonly index: number };

const isText = (element: Element): element is HTMLInputElement | HTMLTextAreaElement =>
  element instanceof HTMLTextAreaElement || (element instanceof HTMLInputElement && element.type === 'text');

/** Whether an arrow sideways would leave the text: all of it is selected, or the caret stands at that end. */
function leavesText(element: Element, back: boolean): boolean {
  if (!isText(element)) return true;
  const { selectionStart, selectionEnd, value } = element;
  if (selectionStart === 0 && selectionEnd === value.length) return true;
  return selectionStart === selectionEnd && selectionStart === (back ? 0 : value.length);
}

function fieldsOf(card: Element): HTMLElement[] {
  return [...card.querySelectorAll<HTMLElement>('[data-field]')];
}

function goTo(lane: Element, index: number, field: string | undefined): boolean {
  const card = lane.querySelector<HTMLElement>(`[data-card="${index}"]`);
  if (!card) return false;
  const target = field ? card.querySelector<HTMLElement>(`[data-field="${field}"]`) : null;
  (target ?? card).focus();
  card.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  return true;
}

function vertical(card: HTMLElement, from: HTMLElement, back: boolean): boolean {
  const stops = [card, ...fieldsOf(card)];
  const next = stops[stops.indexOf(from) + (back ? -1 : 1)];
  next?.focus();
  return next !== undefined;
}

/**
 * Arrow keys among cards and fields: sideways to the same field of the next card, up and down among the fields of one.
 * Enter asks for a segment after this one, Delete on a card asks to remove it, Escape goes from a field to its card.
 */
export function onCardKey(event: KeyboardEvent<HTMLElement>, ask: (key: CardKey) => void): void {
  if (event.defaultPrevented || event.ctrlKey || event.metaKey || event.altKey) return;
  if (!(event.target instanceof HTMLElement)) return;
  const from = event.target;
  const card = from.closest<HTMLElement>('[data-card]');
  if (!card) return;
  const index = Number(card.dataset['card']);
  const field = from.dataset['field'];
  const isCard = from === card;
  if (!isCard && field === undefined && event.key !== 'Escape') return;
  let taken = true;
  if (event.key === 'ArrowLeft' || event.key === 'ArrowRight') {
    const back = event.key === 'ArrowLeft';
    taken = leavesText(from, back) && goTo(event.currentTarget, index + (back ? -1 : 1), field);
  } else if (event.key === 'ArrowUp' || event.key === 'ArrowDown') {
    taken = vertical(card, from, event.key === 'ArrowUp');
  } else if (event.key === 'Enter' && !event.shiftKey) ask({ ask: 'add', index });
  else if ((event.key === 'Delete' || event.key === 'Backspace') && isCard) ask({ ask: 'remove', index });
  else if (event.key === 'Escape' && !isCard) card.focus();
  else taken = false;
  if (taken) event.preventDefault();
}
