import { Screen } from '../ui/Screen';

export const LibraryProtocolScreen = () => <Screen title="Protocol" />;
