# Installs the build into a prefix of its own, moves that elsewhere (nothing installed may point
# back to where it was made), and configures, builds and runs the small program in consumer/
# against it.
set(place ${BUILD}/tests/packaging)
file(REMOVE_RECURSE ${place})
file(MAKE_DIRECTORY ${place})

function(run)
  execute_process(COMMAND ${ARGN} RESULT_VARIABLE result)
  if(NOT result EQUAL 0)
    list(JOIN ARGN " " command)
    message(FATAL_ERROR "failed: ${command}")
  endif()
endfunction()

run(${CMAKE_COMMAND} --install ${BUILD} --prefix ${place}/made)
file(RENAME ${place}/made ${place}/prefix)
run(${CMAKE_COMMAND} -S ${CMAKE_CURRENT_LIST_DIR}/consumer -B ${place}/consumer -G ${GENERATOR}
    -DCMAKE_PREFIX_PATH=${place}/prefix -DCMAKE_CXX_COMPILER=${COMPILER}
    -DCMAKE_CXX_FLAGS=${FLAGS} -DCMAKE_BUILD_TYPE=Release -DBARWALL_EXPECTED=${VERSION})
run(${CMAKE_COMMAND} --build ${place}/consumer)
run(${place}/consumer/pair)
run(${place}/prefix/bin/barwall --version)
