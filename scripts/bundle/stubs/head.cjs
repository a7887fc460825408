// In place of the document head component: Screen sets the title itself.
const Head = () => null;
Head.Provider = ({ children }) => children;
exports.Head = Head;
