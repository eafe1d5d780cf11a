#include "carlin/element/shell.hpp"
