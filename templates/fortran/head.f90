!
{{#each lines}}
! {{line}}
{{/each}}
!
