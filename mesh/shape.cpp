#include "mesh/shape.hpp"
