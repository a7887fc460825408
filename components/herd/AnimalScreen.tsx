import { Screen } from '../ui/Screen';

export const AnimalScreen = () => <Screen title="Animal" />;
