import type { ReactNode } from 'react';
import { useUnits } from '~/lib/client/units';
import type { Kiln } from '~/lib/contracts/equipment';
import { kilnText, mouldsText, patternsText } from './describe';
import type { ProfileDocument } from './document';

export type Panel = 'load' | 'kiln' | null;

interface EditorHeaderProps {
  readonly document: ProfileDocument;
  readonly kiln: Kiln | null;
  readonly readOnly: boolean;
  readonly standing: string;
  readonly saveLine: ReactNode;
  readonly panel: Panel;
  readonly onPanel: (panel: Panel) => void;
  readonly onName: (name: string) => void;
  readonly onNameDone: () => void;
  readonly figures: ReactNode;
}

function Name(props: EditorHeaderProps) {
  const { document } = props;
  if (props.readOnly) return <h1 className="page-title">{document.name}</h1>;
  return (
    <h1 className="editor-name">
      <span className="strip-hidden">{document.name}</span>
      <textarea
        rows={1}
        className="page-title"
        aria-label="Name of the profile"
        maxLength={120}
        value={document.name}
        onChange={(event) => props.onName(event.currentTarget.value.replace(/\n/g, ' '))}
        onBlur={props.onNameDone}
        onKeyDown={(event) => {
          if (event.key !== 'Enter') return;
          event.preventDefault();
          event.currentTarget.blur();
        }}
      />
    </h1>
  );
}

/** What it is, where it stands, what it fires in which kiln; and the figures that come of it. */
export function EditorHeader(props: EditorHeaderProps) {
  const { document, kiln, panel } = props;
  const units = useUnits();
  const opener = (which: 'load' | 'kiln', text: string) => (
    <button
      type="button"
      className="link editor-opener"
      aria-expanded={panel === which}
      aria-controls={panel === which ? `panel-${which}` : undefined}
      onClick={() => props.onPanel(panel === which ? null : which)}
    >
      {text}
    </button>
  );
  const patterns = patternsText(document.load, units);
  return (
    <header className="editor-head">
      <div className="editor-title">
        <Name {...props} />
        <p className="lead">
          {props.standing}, {props.saveLine}
          {' · fires '}
          {opener('load', mouldsText(document.load, units))}
          {patterns === null ? null : (
            <>
              {' with '}
              {opener('load', patterns)}
            </>
          )}
          {' in '}
          {opener('kiln', kiln ? kilnText(kiln) : 'no kiln yet')}
        </p>
      </div>
      {props.figures}
    </header>
  );
}
