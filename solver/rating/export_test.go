package rating

// Skin opens the skin effect to the tests.
var Skin = skin
