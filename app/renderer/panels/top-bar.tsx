import { Button, FileTrigger, Menu, MenuItem, MenuTrigger, Popover, Text } from 'react-aria-components';
import { Segmented } from '../controls/segmented';
import { useController, useWindowState } from '../state/window-context';
import type { Theme } from '../state/window-state';
import { DarkIcon, LightIcon, Mark, SystemIcon } from './icons';
import { saveOptions } from './save-options';

const THEMES: readonly { readonly key: Theme; readonly text: React.ReactNode; readonly name: string }[] = [
  { key: 'light', text: <LightIcon />, name: 'light' },
  { key: 'system', text: <SystemIcon />, name: 'as the system' },
  { key: 'dark', text: <DarkIcon />, name: 'dark' },
];

/** Files in and out, and the window's look. */
export function TopBar() {
  const samples = useWindowState(({ catalogue }) => catalogue.samples);
  const version = useWindowState(({ catalogue }) => catalogue.program?.version);
  const theme = useWindowState(({ view }) => view.theme);
  const state = useWindowState((whole) => whole);
  const controller = useController();
  const options = saveOptions(state, (...request) => controller.reportFile(...request));
  return (
    <header className="topBar">
      <h1 title={version === undefined ? 'Farwell' : `Farwell ${version}`}>
        <Mark /> Farwell
      </h1>
      <nav aria-label="Files">
        <MenuTrigger>
          <Button className="barButton">
            Samples <span aria-hidden="true" className="chevron" />
          </Button>
          <Popover className="popover listPopover sampleMenu">
            <Menu
              className="list"
              aria-label="Samples"
              items={samples}
              onAction={(id) => void controller.openSample(String(id))}
            >
              {({ title, sentence }) => (
                <MenuItem textValue={title}>
                  <Text slot="label">{title}</Text>
                  <Text slot="description">{sentence}</Text>
                </MenuItem>
              )}
            </Menu>
          </Popover>
        </MenuTrigger>
        <FileTrigger
          acceptedFileTypes={['.json']}
          onSelect={(files) => {
            const file = files?.[0];
            if (file !== undefined) void file.text().then((text) => controller.openText(file.name, text));
          }}
        >
          <Button className="barButton">Open…</Button>
        </FileTrigger>
        <MenuTrigger>
          <Button className="barButton">
            Save <span aria-hidden="true" className="chevron" />
          </Button>
          <Popover className="popover listPopover">
            <Menu
              className="list"
              aria-label="Save"
              items={options}
              disabledKeys={options.flatMap(({ id, file }) => (file === undefined ? [id] : []))}
              onAction={(chosen) => {
                const file = options.find(({ id }) => id === chosen)?.file;
                if (file !== undefined) void controller.save(file);
              }}
            >
              {({ name, description }) => (
                <MenuItem textValue={name}>
                  <Text slot="label">{name}</Text>
                  <Text slot="description">{description}</Text>
                </MenuItem>
              )}
            </Menu>
          </Popover>
        </MenuTrigger>
      </nav>
      <Segmented
        label="Light or dark"
        options={THEMES}
        chosen={theme}
        onChoose={(chosen) => controller.changeView({ theme: chosen })}
      />
    </header>
  );
}
