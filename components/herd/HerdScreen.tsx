import { Screen } from '../ui/Screen';

export const HerdScreen = () => <Screen title="Herd" />;
