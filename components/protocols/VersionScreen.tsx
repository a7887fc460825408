import { Screen } from '../ui/Screen';

export const VersionScreen = () => <Screen title="Protocol" />;
