import { islandProps } from '~/lib/client/island-props';
import { ServerData } from '~/lib/client/query';
import { UnitsProvider } from '~/lib/client/units';
import { EditorPage } from './EditorPage';
import './editor.css';
import './figures.css';
import './switches.css';
import './typing.css';
import './cards.css';
import './upright.css';
import './cautions.css';
import './draft.css';
import './outcome.css';
import './load.css';
import './dialogs.css';
import './conflict.css';
import { profileEditorPropsSchema, type ProfileEditorInput } from './props';

/** The profile editor as an island. Its props come from the page and are parsed here. */
export default function ProfileEditor(input: ProfileEditorInput) {
  const props = islandProps(profileEditorPropsSchema, input);
  return (
    <ServerData>
      <UnitsProvider units={props.me.preferences.units ?? props.me.studio.units}>
        <EditorPage {...props} />
      </UnitsProvider>
    </ServerData>
  );
}
