import { Screen } from '../ui/Screen';

export const MedicinesScreen = () => <Screen title="Medicines" />;
